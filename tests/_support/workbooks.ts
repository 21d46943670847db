import { randomUUID } from 'node:crypto'
import type { Actor } from '@/db/access/members'
import { appendOperations, createWorkbook, openWorkbook } from '@/db/access/workbooks'
import {
  applyOperation,
  fromJson,
  type Operation,
  type SentOperation,
  toJson,
  type WorkbookJson,
  type WorkbookOpened,
} from '@/lib/workbook'
import { expectOk } from './database'

export async function makeWorkbook(actor: Actor, title = 'A house'): Promise<string> {
  const making = { now: () => new Date(), newId: randomUUID }
  return expectOk(await createWorkbook(actor, { title, frame: 'gable', system: 'us' }, making)).id
}

/** A number in a far corner of the Job sheet, where no formula looks. */
export function setCell(input: number | string, row = 40): Operation {
  return { kind: 'set-cells', sheet: 'job', cells: [{ row, column: 1, input }] }
}

/** Room for `setCell`. */
export function addRows(count = 60): Operation {
  return { kind: 'insert-lines', sheet: 'job', axis: 'row', at: 1, count }
}

export function sent(op: Operation, batch: string = randomUUID()): SentOperation {
  return { id: randomUUID(), batch, op }
}

/** Appends on the newest state, which is asked for first. */
export async function appendNow(actor: Actor, id: string, operations: readonly Operation[]): Promise<number> {
  const { seq } = expectOk(await openWorkbook(actor, id))
  const request = { base: seq, operations: operations.map((op) => sent(op)) }
  const answer = expectOk(await appendOperations(actor, id, request))
  if (!('accepted' in answer)) throw new Error('behind, though nobody else appends')
  return answer.seq
}

/** The state that a client builds from what it was given. */
export function stateOf(opened: WorkbookOpened): WorkbookJson {
  const workbook = fromJson(structuredClone(opened.snapshot.workbook))
  for (const { op } of opened.tail) expectOk(applyOperation(workbook, op))
  return toJson(workbook)
}
