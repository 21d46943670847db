import { type CellAddress, type LoggedOperation, type Operation, ValueCache } from '@/lib/workbook'

export interface LastChange {
  readonly author: string
  /** ISO 8601. */
  readonly at: string
}

/** Who changed a cell last and when, as far as this tab has seen it; it goes with its cell when lines move. */
export class LastChanges {
  private readonly changes: LastChange[] = []
  /** By cell, the place in `changes`. */
  private readonly cells = new ValueCache()

  of(address: CellAddress): LastChange | undefined {
    const place = this.cells.get(address)
    return typeof place === 'number' ? this.changes[place] : undefined
  }

  /** Takes part in what was done, one operation after another; without a change the cells only move. */
  follow(operations: readonly Operation[], change?: LastChange): void {
    const place = change ? this.changes.push(change) - 1 : undefined
    for (const operation of operations) {
      this.cells.follow(operation)
      if (place === undefined || operation.kind !== 'set-cells') continue
      for (const { row, column } of operation.cells) {
        this.cells.set({ sheet: operation.sheet, row, column }, place)
      }
    }
  }

  /** What others did, as it reads here. Where it became more or fewer operations, the last author stands for all. */
  followLogged(operations: readonly Operation[], logged: readonly LoggedOperation[]): void {
    const paired = operations.length === logged.length
    operations.forEach((operation, i) => {
      this.follow([operation], paired ? logged[i] : logged.at(-1))
    })
  }
}
