import type { CellAddress, PackedChanges } from '../contracts'
import { type CellError, type CellValue, isCellError } from '../model'

/** Values of `PackedChanges.type`. */
export const packedType = { blank: 0, number: 1, text: 2, boolean: 3, error: 4 } as const

/** Collects changes and packs them; a later value of one cell may follow an earlier and then stands. */
export class ChangePacker {
  private readonly sheets: string[] = []
  private readonly sheetIndex = new Map<string, number>()
  private readonly addresses: number[] = []
  private readonly types: number[] = []
  private readonly numbers: number[] = []
  private readonly texts: string[] = []
  private readonly errors: CellError[] = []

  add(sheet: string, row: number, column: number, value: CellValue): void {
    let index = this.sheetIndex.get(sheet)
    if (index === undefined) {
      index = this.sheets.length
      this.sheets.push(sheet)
      this.sheetIndex.set(sheet, index)
    }
    this.addresses.push(index, row, column)
    if (value === null) this.put(packedType.blank, 0)
    else if (typeof value === 'number') this.put(packedType.number, value)
    else if (typeof value === 'boolean') this.put(packedType.boolean, value ? 1 : 0)
    else if (isCellError(value)) this.put(packedType.error, this.errors.push(value) - 1)
    else this.put(packedType.text, this.texts.push(value) - 1)
  }

  pack(): PackedChanges {
    return {
      sheets: this.sheets,
      address: Uint32Array.from(this.addresses),
      type: Uint8Array.from(this.types),
      numbers: Float64Array.from(this.numbers),
      texts: this.texts,
      errors: this.errors,
    }
  }

  private put(type: number, number: number): void {
    this.types.push(type)
    this.numbers.push(number)
  }
}

/** The arrays to name as transferred when packed changes are posted. */
export function transferOf(packed: PackedChanges): ArrayBuffer[] {
  return [packed.address.buffer, packed.type.buffer, packed.numbers.buffer] as ArrayBuffer[]
}

export function unpack(packed: PackedChanges, visit: (address: CellAddress, value: CellValue) => void): void {
  for (let i = 0; i < packed.type.length; i += 1) {
    const sheet = packed.sheets[packed.address[3 * i] ?? 0] ?? ''
    const row = packed.address[3 * i + 1] ?? 0
    const column = packed.address[3 * i + 2] ?? 0
    visit({ sheet, row, column }, packedValue(packed, i))
  }
}

/** The value of entry `i`. */
export function packedValue(packed: PackedChanges, i: number): CellValue {
  const number = packed.numbers[i] ?? 0
  switch (packed.type[i]) {
    case packedType.number:
      return number
    case packedType.text:
      return packed.texts[number] ?? ''
    case packedType.boolean:
      return number === 1
    case packedType.error:
      return packed.errors[number] ?? null
    default:
      return null
  }
}
