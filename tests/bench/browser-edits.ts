import type { Browser, Page } from 'playwright-core'
import { engineConfig } from '@/lib/workbook/engine/config'
import type { Bench, Uploaded } from './browser'
import { editRawPage, openRawPage, type RawEdit } from './chromium'
import { backToCell, goToCell, openEditor, typeNumber } from './editor-page'
import { type LongestTask, longestTaskDuring } from './main-thread'
import { painted } from './page-probe'
import { type RawSource, rawSource } from './raw-engine'
import type { Line } from './report'
import { maximum, median } from './statistics'
import type { Edit, Subject } from './subject'

const warmUp = 3
const edits = 7
const watched = 5

interface Timed {
  readonly raw: RawEdit
  /** Milliseconds from Enter until the result was painted. */
  readonly paint: number
}

/** The longest task of one edit here, and of the same edit with the engine on the main thread. */
interface Tasks {
  readonly here: LongestTask
  readonly there: LongestTask
}

/**
 * Edits typed into the grid, each preceded by the same edit in a page that runs HyperFormula on its main thread:
 * the number that comes out there must be painted here. The longest tasks are watched in edits of their own.
 */
export async function measureEdits(bench: Bench, { id, title, subject }: Uploaded, whole: boolean) {
  const source = rawSource(subject.workbook, engineConfig)
  const rawPage = await bench.browser.newPage()
  await openRawPage(rawPage, source)
  const page = await openEditor(bench.context, bench.app, id)
  const both = new BothPages(page, rawPage, source, subject)
  const { fan, local } = subject.edits

  await goToCell(page, subject.workbook, fan.place)
  const fans = (await both.times(fan, warmUp + edits)).slice(warmUp)
  const tasks = whole ? await both.tasks(bench.browser, fan, watched) : undefined
  await goToCell(page, subject.workbook, local.place)
  const locals = (await both.times(local, warmUp + edits)).slice(warmUp)
  await page.close()
  await rawPage.close()

  const lines = [fanLine(title, fans), localLine(title, locals)]
  return tasks ? [...lines, ...taskLines(title, tasks)] : lines
}

class BothPages {
  private made = 0

  constructor(
    private readonly page: Page,
    private readonly rawPage: Page,
    private readonly source: RawSource,
    private readonly subject: Subject,
  ) {}

  async times(edit: Edit, count: number): Promise<Timed[]> {
    const times: Timed[] = []
    for (let i = 0; i < count; i++) {
      const number = this.next(edit)
      const raw = await this.editRaw(edit, number)
      await typeNumber(this.page, number)
      const shown = painted(this.page, raw.result, 0.0051)
      await this.page.keyboard.press('Enter')
      times.push({ raw, paint: (await shown).sinceEnter })
      await backToCell(this.page)
    }
    return times
  }

  async tasks(browser: Browser, edit: Edit, count: number): Promise<Tasks[]> {
    const tasks: Tasks[] = []
    for (let i = 0; i < count; i++) {
      const number = this.next(edit)
      let expected = Number.NaN
      const there = await longestTaskDuring(browser, this.rawPage, async () => {
        expected = (await this.editRaw(edit, number)).result
      })
      await typeNumber(this.page, number)
      const here = await longestTaskDuring(browser, this.page, async () => {
        const shown = painted(this.page, expected, 0.0051)
        await this.page.keyboard.press('Enter')
        await shown
        await this.page.waitForTimeout(300)
      })
      tasks.push({ here, there })
      await backToCell(this.page)
    }
    return tasks
  }

  /** Numbers of few digits, each another. */
  private next({ from }: Edit): number {
    this.made += 1
    return from * (1 + this.made / 64)
  }

  private editRaw(edit: Edit, number: number): Promise<RawEdit> {
    const at = ({ sheet, row, column }: Edit['place']) => {
      const title = this.subject.workbook.sheets.find((one) => one.id === sheet)?.name ?? ''
      return { sheet: Object.keys(this.source.sheets).indexOf(title), row, col: column }
    }
    return editRawPage(this.rawPage, at(edit.place), number, at(edit.result))
  }
}

const engineOf = (times: readonly Timed[]) => median(times.map(({ raw }) => raw.engine))
const paintOf = (times: readonly Timed[]) => median(times.map(({ paint }) => paint))
const words = (times: readonly Timed[]) =>
  `app ${paintOf(times).toFixed(1)} ms, raw engine ${engineOf(times).toFixed(1)} ms`

function fanLine(title: string, times: readonly Timed[]): Line {
  return {
    section: 'browser',
    what: `${title}: fan edit, Enter to paint, to raw engine`,
    value: paintOf(times) / engineOf(times),
    unit: 'ratio',
    goal: { most: 1.15 },
    raw: words(times),
  }
}

function localLine(title: string, times: readonly Timed[]): Line {
  return {
    section: 'browser',
    what: `${title}: local edit, Enter to paint, beyond raw engine`,
    value: paintOf(times) - engineOf(times),
    unit: 'ms',
    goal: { most: 25 },
    raw: words(times),
  }
}

function taskLines(title: string, tasks: readonly Tasks[]): Line[] {
  const here = tasks.map((one) => one.here.processor)
  const there = tasks.map((one) => one.there.processor)
  const list = (times: readonly number[]) => times.map((time) => time.toFixed(1)).join(', ')
  const line = (what: string, value: number, unit: Line['unit'], most: number, raw: string): Line => ({
    section: 'browser',
    what: `${title}: longest main-thread task of a fan edit, ${what}`,
    value,
    unit,
    goal: { most },
    raw,
  })
  const clock = `by the clock ${list(tasks.map((one) => one.here.clock))} ms`
  return [
    line('median', median(here), 'ms', 16, `processor time ${list(here)} ms; ${clock}`),
    line('worst', maximum(here), 'ms', 50, clock),
    line(
      'to the engine on the main thread',
      median(here) / median(there),
      'ratio',
      0.06,
      `there ${list(there)} ms`,
    ),
  ]
}
