/**
 * Rows of cells as tab-separated text, the form of the clipboard.
 *
 * W25 Tabs part cells, line feeds (or carriage return and line feed) part rows; a last line end adds no row.
 * W26 A cell that begins with a quote runs to its closing quote and may hold tabs and line ends; doubled quotes stand for one.
 *     A quote elsewhere, or one that is never closed, is itself.
 */
export function parseTsv(text: string): string[][] {
  const rows: string[][] = []
  let row: string[] = []
  let at = 0
  while (at <= text.length) {
    const { cell, end } = text[at] === '"' ? quotedCell(text, at) : plainCell(text, at)
    row.push(cell)
    at = end
    if (text[at] === '\t') {
      at += 1
      continue
    }
    rows.push(row)
    row = []
    if (text[at] === '\r' && text[at + 1] === '\n') at += 1
    at += 1
    if (at >= text.length) break
  }
  return rows.length === 1 && rows[0]?.length === 1 && rows[0][0] === '' ? [] : rows
}

interface Taken {
  readonly cell: string
  readonly end: number
}

function plainCell(text: string, at: number): Taken {
  let end = at
  while (end < text.length && !isBorder(text[end])) end += 1
  return { cell: text.slice(at, end), end }
}

/** A cell in quotes; plain when the quote is not closed at the end of a cell (an inch mark, say). */
function quotedCell(text: string, at: number): Taken {
  let cell = ''
  let from = at + 1
  for (;;) {
    const quote = text.indexOf('"', from)
    if (quote < 0) return plainCell(text, at)
    cell += text.slice(from, quote)
    if (text[quote + 1] === '"') {
      cell += '"'
      from = quote + 2
      continue
    }
    const end = quote + 1
    return end === text.length || isBorder(text[end]) ? { cell, end } : plainCell(text, at)
  }
}

function isBorder(character: string | undefined): boolean {
  return character === '\t' || character === '\n' || character === '\r'
}

/** Cells that hold a tab, a line end or a leading quote are quoted; rows end with a line feed but the last. */
export function toTsv(rows: readonly (readonly string[])[]): string {
  return rows.map((row) => row.map(quoted).join('\t')).join('\n')
}

function quoted(cell: string): string {
  return /[\t\r\n]|^"/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell
}
