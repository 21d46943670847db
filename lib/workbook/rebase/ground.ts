import type { Operation } from '../operations'

/** What a transformation has to know of the workbook that both operations start from: its sheets in order. */
export interface SheetGround {
  readonly id: string
  readonly name: string
}

/** The sheets after an operation. */
export function groundAfter(sheets: readonly SheetGround[], operation: Operation): readonly SheetGround[] {
  switch (operation.kind) {
    case 'add-sheet':
      return sheets.toSpliced(operation.at, 0, { id: operation.sheet, name: operation.name })
    case 'remove-sheet':
      return sheets.filter(({ id }) => id !== operation.sheet)
    case 'rename-sheet':
      return sheets.map((sheet) =>
        sheet.id === operation.sheet ? { ...sheet, name: operation.name } : sheet,
      )
    case 'reorder-sheet': {
      const moved = sheets.find(({ id }) => id === operation.sheet)
      if (!moved) return sheets
      return sheets.filter((sheet) => sheet !== moved).toSpliced(operation.to, 0, moved)
    }
    default:
      return sheets
  }
}

export function nameOf(sheets: readonly SheetGround[], id: string): string | undefined {
  return sheets.find((sheet) => sheet.id === id)?.name
}
