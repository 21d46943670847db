import type { Area } from '../workbook'
import type { Block, GridBlock, SheetDeclaration } from './declare'

/** Where each block stands: row 0 of a sheet is the header of its first block, and blocks have a blank row between them. */
export interface PlacedBlock {
  readonly sheet: SheetDeclaration
  readonly block: Block
  readonly headerRow: number
  readonly firstRow: number
  /** Rows without the header, the closing row included. */
  readonly rowCount: number
}

export interface Placed {
  readonly blocks: readonly PlacedBlock[]
  /** Cells of each name. */
  readonly areas: ReadonlyMap<string, Area>
  readonly sheetNames: ReadonlyMap<string, string>
}

export const lineColumns = [
  { title: 'Item', width: 230 },
  { title: 'Value', width: 130 },
  { title: 'Unit', width: 110 },
  { title: 'Source', width: 260 },
  { title: 'Note', width: 420 },
  { title: 'Name', width: 220 },
] as const

/** First pass: rows and names. A name that is declared twice is a bug in the declarations. */
export function place(sheets: readonly SheetDeclaration[]): Placed {
  const blocks: PlacedBlock[] = []
  const areas = new Map<string, Area>()
  const name = (key: string, area: Area): void => {
    if (areas.has(key)) throw new Error(`the name ${key} is declared twice`)
    areas.set(key, area)
  }
  for (const sheet of sheets) {
    let row = 0
    for (const block of sheet.blocks) {
      const firstRow = row + 1
      const rowCount =
        block.kind === 'lines'
          ? block.lines.length
          : block.rows.length + (block.closing === undefined ? 0 : 1)
      blocks.push({ sheet, block, headerRow: row, firstRow, rowCount })
      if (block.kind === 'lines') {
        block.lines.forEach((line, index) => {
          if (line.kind === 'heading') return
          name(line.name, { sheet: sheet.id, row: firstRow + index, column: 1, rowCount: 1, columnCount: 1 })
        })
      } else placeGridNames(sheet, block, firstRow, rowCount, name)
      row = firstRow + rowCount + 1
    }
  }
  return { blocks, areas, sheetNames: new Map(sheets.map((sheet) => [sheet.id, sheet.name])) }
}

function placeGridNames(
  sheet: SheetDeclaration,
  block: GridBlock,
  firstRow: number,
  rowCount: number,
  name: (key: string, area: Area) => void,
): void {
  const columnCount = block.columns.length
  if (block.table) {
    name(block.table.name, { sheet: sheet.id, row: firstRow, column: 0, rowCount, columnCount })
    const header = { sheet: sheet.id, row: firstRow - 1, column: 0, rowCount: 1, columnCount }
    name(`${block.table.name}_columns`, header)
  }
  block.columns.forEach((column, index) => {
    if (!column.named) return
    name(column.named.name, { sheet: sheet.id, row: firstRow, column: index, rowCount, columnCount: 1 })
  })
  block.rows.forEach((row, index) => {
    for (const [title, content] of Object.entries(row)) {
      if (typeof content !== 'object' || !('name' in content) || !content.name) continue
      const at = columnOf(block, title)
      name(content.name.name, {
        sheet: sheet.id,
        row: firstRow + index,
        column: at,
        rowCount: 1,
        columnCount: 1,
      })
    }
  })
}

const titlesOf = new WeakMap<GridBlock, ReadonlyMap<string, number>>()

export function columnOf(block: GridBlock, title: string): number {
  let titles = titlesOf.get(block)
  if (!titles) {
    titles = new Map(block.columns.map((column, index) => [column.title.toLowerCase(), index]))
    titlesOf.set(block, titles)
  }
  const index = titles.get(title.toLowerCase())
  if (index === undefined) throw new Error(`no column is called ${title}`)
  return index
}

export function quoteSheet(name: string): string {
  return /^[A-Za-z]+$/.test(name) ? name : `'${name.replaceAll("'", "''")}'`
}
