import { describe, expect, it } from 'vitest'
import { EngineLink } from '@/app/(office)/workbooks/[workbookId]/_editor/engine-link'
import { SessionValues } from '@/app/(office)/workbooks/[workbookId]/_editor/values'
import {
  applyOperation,
  type EngineReply,
  type EngineRequest,
  fromJson,
  type Operation,
  toJson,
} from '@/lib/workbook'
import { serveEngine } from '@/lib/workbook/engine'

const json = {
  version: 1,
  system: 'us',
  names: [],
  sheets: [
    {
      id: 'heat',
      name: 'Heat',
      kind: 'step',
      rowCount: 6,
      columns: [{}, {}],
      cells: [
        [1, 1, { input: 10 }],
        [3, 1, { input: '=B2*2' }],
        [4, 1, { input: 100, format: { quantity: 'length' } }],
        [5, 1, { input: '=B5*B2', format: { quantity: 'length' } }],
      ],
    },
  ],
} as const

/** The real engine, answering only when it is told to, so that the workbook can get ahead of it. */
function slowEngine() {
  const requests: (() => void)[] = []
  let answer: (request: EngineRequest) => void = () => undefined
  let listen: (reply: EngineReply) => void = () => undefined
  serveEngine({
    post: (reply) => listen(reply),
    onMessage: (listener) => {
      answer = listener
    },
  })
  return {
    /** Lets the oldest request through; false when there is none. */
    next: () => {
      const request = requests.shift()
      request?.()
      return request !== undefined
    },
    spawn: () => ({
      post: (request: EngineRequest) => {
        requests.push(() => answer(request))
      },
      onMessage: (listener: (reply: EngineReply) => void) => {
        listen = listener
      },
      onError: () => undefined,
      terminate: () => undefined,
    }),
  }
}

function opened() {
  const workbook = fromJson(json)
  const values = new SessionValues(workbook, undefined)
  const engine = slowEngine()
  const link = new EngineLink(
    {
      workbook: () => toJson(workbook),
      changes: (packed, all, ahead) => values.take(packed, all, ahead),
      status: () => undefined,
      stopped: () => undefined,
    },
    engine.spawn,
  )
  const act = (operation: Operation) => {
    const applied = applyOperation(workbook, operation)
    if (!applied.ok) throw new Error(applied.failure.text)
    values.follow([operation], applied.value.touched)
    link.apply([operation])
  }
  return { values, link, engine, act, at: (row: number) => values.value({ sheet: 'heat', row, column: 1 }) }
}

const set = (row: number, input: number | string): Operation => ({
  kind: 'set-cells',
  sheet: 'heat',
  cells: [{ row, column: 1, input }],
})

describe('values on the screen', () => {
  it('what is typed shows at once, what follows from it when it is computed', () => {
    const { link, engine, act, at } = opened()
    expect(at(1)).toBe(10)
    link.start()
    engine.next()
    expect(at(3)).toBe(20)
    act(set(1, 15))
    expect([at(1), at(3)]).toEqual([15, 20])
    engine.next()
    expect([at(1), at(3)]).toEqual([15, 30])
    link.close()
  })

  it('an answer that comes after rows were inserted lands on the rows it is about', () => {
    const { link, engine, act, at } = opened()
    link.start()
    engine.next()
    act(set(1, 15))
    act({ kind: 'insert-lines', sheet: 'heat', axis: 'row', at: 2, count: 1 })
    engine.next()
    expect([at(1), at(2), at(3), at(4)]).toEqual([15, null, null, 30])
    while (engine.next());
    expect([at(1), at(2), at(3), at(4)]).toEqual([15, null, null, 30])
    link.close()
  })

  it('results stand in the other units as soon as they are converted, also those that were on their way', () => {
    const { link, engine, act, at } = opened()
    link.start()
    engine.next()
    expect(at(5)).toBe(1000)
    act(set(1, 20))
    act({ kind: 'convert-units', system: 'si' })
    expect(at(4)).toBeCloseTo(30.48, 12)
    expect(at(5)).toBeCloseTo(304.8, 9)
    engine.next()
    expect([at(3), at(5)]).toEqual([40, expect.closeTo(609.6, 9)])
    while (engine.next());
    expect([at(3), at(5)]).toEqual([40, expect.closeTo(609.6, 9)])
    link.close()
  })

  it('an older answer does not put back what has been typed over since', () => {
    const { link, engine, act, at } = opened()
    link.start()
    engine.next()
    act(set(1, 15))
    act(set(1, 16))
    engine.next()
    expect(at(1)).toBe(16)
    while (engine.next());
    expect([at(1), at(3)]).toEqual([16, 32])
    link.close()
  })

  it('what is done before the engine has started is part of what it opens', () => {
    const { link, engine, act, at } = opened()
    act(set(1, 15))
    link.start()
    act(set(1, 16))
    while (engine.next());
    expect([at(1), at(3)]).toEqual([16, 32])
    link.close()
  })
})
