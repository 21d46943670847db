import { always, hasOtherWorkbooks, hasWorkbook } from './availability'
import type { ArgumentOption, Command } from './command'

/** House forms that a new workbook starts from. */
const frames: readonly ArgumentOption[] = [
  { value: 'gable', title: 'gable house', synonyms: ['gable', 'ridge', 'a-frame'] },
  { value: 'hoop', title: 'hoop house', synonyms: ['hoop', 'arch', 'tunnel', 'quonset'] },
]

const systems: readonly ArgumentOption[] = [
  { value: 'us', title: 'feet and °F', detail: 'US customary units', synonyms: ['us', 'imperial', 'feet'] },
  { value: 'si', title: 'metres and °C', detail: 'SI units', synonyms: ['si', 'metric', 'metres', 'meters'] },
]

const titleExpected = 'Give a title of 1 to 120 characters'
const isTitle = (text: string) => text.trim().length >= 1 && text.trim().length <= 120

const newWorkbook: Command = {
  id: 'new-workbook',
  title: 'New workbook …',
  phrase: [
    'New workbook',
    { argument: 'title' },
    'for a',
    { argument: 'frame' },
    'in',
    { argument: 'system' },
  ],
  synonyms: ['create workbook', 'start estimate', 'new estimate', 'new job', 'new house', 'begin'],
  group: 'Workbook',
  keys: ['Alt+Shift+N'],
  anywhere: true,
  when: ({ may }) => may.change || 'You may look but not make workbooks',
  arguments: [
    {
      kind: 'text',
      id: 'title',
      label: 'a title',
      example: 'a title, such as Millbrook school hoop house',
      check: (_, text) => (isTitle(text) ? undefined : titleExpected),
    },
    { kind: 'choice', id: 'frame', label: 'a form of house', options: () => frames },
    { kind: 'choice', id: 'system', label: 'a unit system', options: () => systems },
  ],
  says: () => 'Makes a workbook from the blank template and opens it.',
  run: (_, args) => {
    const title = String(args.title ?? '').trim()
    if (!isTitle(title)) return { kind: 'refused', text: titleExpected }
    const frame = frames.find(({ value }) => value === args.frame)?.value
    if (!frame) return { kind: 'refused', text: 'Pick a form of house from the list' }
    const system = args.system === 'si' ? 'si' : 'us'
    return { kind: 'view', change: { kind: 'new-workbook', title, frame, system } }
  },
}

const openWorkbook: Command = {
  id: 'open-workbook',
  title: 'Open a workbook …',
  phrase: ['Open', { argument: 'workbook' }],
  synonyms: ['recent', 'switch workbook', 'open estimate', 'load'],
  group: 'Workbook',
  anywhere: true,
  when: hasOtherWorkbooks,
  arguments: [
    {
      kind: 'choice',
      id: 'workbook',
      label: 'a workbook',
      options: ({ workbooks }) =>
        workbooks.map(({ id, title, changed }) => ({ value: id, title, detail: changed })),
    },
  ],
  says: ({ workbooks }, args) => {
    const title = workbooks.find(({ id }) => id === args.workbook)?.title
    return title === undefined ? 'Opens one of your recent workbooks.' : `Opens ${title}.`
  },
  run: ({ workbooks }, args) => {
    const found = workbooks.find(({ id }) => id === args.workbook)
    return found
      ? { kind: 'view', change: { kind: 'open-workbook', workbook: found.id } }
      : { kind: 'refused', text: 'That workbook is no longer there' }
  },
}

const listWorkbooks: Command = {
  id: 'list-workbooks',
  title: 'Show all workbooks',
  synonyms: ['list workbooks', 'home', 'close workbook', 'back to list', 'workbooks'],
  group: 'Workbook',
  anywhere: true,
  when: always,
  says: () => 'Leaves this page for the list of workbooks.',
  run: () => ({ kind: 'view', change: { kind: 'list-workbooks' } }),
}

const exportXlsx: Command = {
  id: 'export-xlsx',
  title: 'Export as XLSX',
  synonyms: ['download', 'spreadsheet file', 'save as', 'xlsx', 'export workbook'],
  group: 'Workbook',
  keys: ['Alt+Shift+E'],
  when: hasWorkbook,
  says: () => 'Downloads the workbook with live formulas; nothing here changes.',
  run: () => ({ kind: 'view', change: { kind: 'export-xlsx' } }),
}

export const workbookCommands: readonly Command[] = [newWorkbook, openWorkbook, listWorkbooks, exportXlsx]
