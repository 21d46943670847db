import type { CellValue, Operation, Workbook } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'
import { engineConfig } from '@/lib/workbook/engine/config'
import { answer, childArgument } from './child'
import { cpuClock } from './cpu-clock'
import type { EngineTimes } from './engine-times'
import { buildRaw, rawAddress, rawSource } from './raw-engine'
import { editKinds, type Place, type Subject, setNumber } from './subject'
import { type SubjectName, subjectOf } from './subjects'

const edits = 9
/** The first edits run code that is not compiled yet; they are made, not counted. */
const warmUp = 3

interface Driver {
  build(workbook: Workbook): void
  /** Gives how many cells changed. */
  set(place: Place, value: number): number
  value(place: Place): CellValue
}

function rawDriver(workbook: Workbook): Driver {
  const source = rawSource(workbook, engineConfig)
  let raw: ReturnType<typeof buildRaw>
  return {
    build: () => {
      raw = buildRaw(source)
    },
    set: (place, value) => raw.setCellContents(rawAddress(raw, workbook, place), value).length,
    value: (place) => raw.getCellValue(rawAddress(raw, workbook, place)) as CellValue,
  }
}

function appDriver(): Driver {
  let engine: ReturnType<typeof createEngine>
  return {
    build: (workbook) => {
      engine = createEngine(workbook)
    },
    set: (place, value) => {
      const operations: Operation[] = [setNumber(place, value)]
      return engine.apply(operations).type.length
    },
    value: (place) => engine.value(place),
  }
}

function measure(driver: Driver, subject: Subject): EngineTimes {
  const started = cpuClock()
  driver.build(subject.workbook)
  const times: EngineTimes = {
    build: cpuClock() - started,
    edits: { fan: [], price: [], local: [] },
    changes: { fan: 0, price: 0, local: 0 },
    results: { fan: null, price: null, local: null },
  }
  for (const kind of editKinds) {
    const { place, from, result } = subject.edits[kind]
    for (let i = 1; i <= warmUp + edits; i++) {
      const before = cpuClock()
      times.changes[kind] = driver.set(place, from * (1 + i / 64))
      if (i > warmUp) times.edits[kind].push(cpuClock() - before)
    }
    times.results[kind] = driver.value(result)
  }
  return times
}

const { who, what } = childArgument<{ who: 'raw' | 'app'; what: SubjectName }>()
const subject = subjectOf(what)
answer(measure(who === 'raw' ? rawDriver(subject.workbook) : appDriver(), subject))
