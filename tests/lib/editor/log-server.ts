import type { Answer, Server } from '@/app/(office)/workbooks/[workbookId]/_editor/post-operations'
import { applyOperation, type LoggedOperation, type SentOperation, type Workbook } from '@/lib/workbook'

/** The rules of the operation log in memory: ids once, new ones only on the newest sequence, all or none. */
export class LogServer implements Server {
  readonly log: LoggedOperation[] = []
  /** What the next answers are instead of the true ones; `lost` answers are given up after the work is done. */
  faults: ('unreachable' | 'lost' | 'signed-out')[] = []
  refuse: (operation: SentOperation) => string | undefined = () => undefined

  constructor(private readonly workbook: Workbook) {}

  async post(request: { base: number; operations: readonly SentOperation[] }): Promise<Answer> {
    const fault = this.faults.shift()
    if (fault === 'unreachable' || fault === 'signed-out') return { kind: fault }
    const answer = this.append(request.base, request.operations)
    return fault === 'lost' ? { kind: 'unreachable' } : answer
  }

  async missing(base: number) {
    return { seq: this.log.length, operations: this.log.slice(base) }
  }

  private append(base: number, operations: readonly SentOperation[]): Answer {
    const known = new Map(this.log.map(({ id, seq }) => [id, seq]))
    const fresh = operations.filter(({ id }) => !known.has(id))
    if (fresh.length > 0 && base !== this.log.length) {
      return { kind: 'behind', seq: this.log.length, missing: this.log.slice(base) }
    }
    for (const operation of fresh) {
      const text = this.refuse(operation)
      if (text) return { kind: 'refused', text }
    }
    for (const operation of fresh) {
      const applied = applyOperation(this.workbook, operation.op)
      if (!applied.ok) throw new Error(`the log cannot take it: ${applied.failure.text}`)
      const seq = this.log.length + 1
      this.log.push({ ...operation, seq, author: 'a', at: '2026-01-01T00:00:00.000Z' })
    }
    return {
      kind: 'accepted',
      seq: this.log.length,
      ids: new Set(operations.map(({ id }) => id)),
      fresh: operations.filter(({ id }) => (this.log.find((logged) => logged.id === id)?.seq ?? 0) > base)
        .length,
    }
  }
}
