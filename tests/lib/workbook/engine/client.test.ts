import { describe, expect, test } from 'vitest'
import {
  applyOperation,
  type ClientPort,
  createEngineClient,
  type EngineClientStatus,
  type EngineReply,
  type EngineRequest,
  type Operation,
  type PackedChanges,
  toJson,
  unpack,
} from '@/lib/workbook'

import { serveEngine } from '@/lib/workbook/engine'
import { book } from '../books'

/** A port to a real engine in this thread. `mute` swallows what it is asked, as a worker does that hangs. */
class DirectPort implements ClientPort {
  readonly requests: EngineRequest[] = []
  terminated = false
  private serve: (request: EngineRequest) => void = () => {}
  private reply: (reply: EngineReply) => void = () => {}
  private error: (message: string) => void = () => {}

  constructor(private readonly mute: (request: EngineRequest) => boolean) {
    serveEngine({
      post: (reply) => queueMicrotask(() => this.reply(reply)),
      onMessage: (listener) => {
        this.serve = listener
      },
    })
  }

  post(request: EngineRequest): void {
    this.requests.push(request)
    if (!this.mute(request)) this.serve(request)
  }

  onMessage(listener: (reply: EngineReply) => void): void {
    this.reply = listener
  }

  onError(listener: (message: string) => void): void {
    this.error = listener
  }

  terminate(): void {
    this.terminated = true
  }

  crash(): void {
    this.error('out of memory')
  }
}

function setUp(mute: (request: EngineRequest, port: number) => boolean = () => false) {
  const workbook = book({ Frame: { A1: 2, B1: '=A1*10' }, 'Price list': {} }, { area: ['Frame', 0, 1] })
  const ports: DirectPort[] = []
  const statuses: EngineClientStatus[] = []
  const stops: string[] = []
  const shown = new Map<string, unknown>()
  const timers = new Set<() => void>()
  const client = createEngineClient({
    spawn: () => {
      const number = ports.length
      const port = new DirectPort((request) => mute(request, number))
      ports.push(port)
      return port
    },
    setTimer: (_milliseconds, run) => {
      timers.add(run)
      return () => timers.delete(run)
    },
    workbook: () => toJson(workbook),
    onValues: (packed: PackedChanges) =>
      unpack(packed, ({ sheet, row, column }, value) => shown.set(`${sheet} ${row} ${column}`, value)),
    onStatus: (status) => statuses.push(status),
    onStopped: (text) => stops.push(text),
  })
  const edit = (operation: Operation) => {
    expect(applyOperation(workbook, operation).ok).toBe(true)
    client.apply([operation])
  }
  const runOut = () => {
    for (const run of [...timers]) run()
  }
  const settle = async () => {
    for (let turn = 0; turn < 20; turn += 1) await Promise.resolve()
  }
  return { client, ports, statuses, stops, shown, timers, edit, runOut, settle }
}

const set = (row: number, column: number, input: string | number, sheet = 'frame'): Operation => ({
  kind: 'set-cells',
  sheet,
  cells: [{ row, column, input }],
})

describe('the client of the engine', () => {
  test('opens, applies in order, and shows values', async () => {
    const { client, statuses, shown, edit, settle, timers } = setUp()
    client.start()
    await settle()
    expect(shown.get('frame 0 1')).toBe(20)
    edit(set(0, 0, 3))
    edit(set(1, 0, '=B1+1'))
    await settle()
    expect(shown.get('frame 0 1')).toBe(30)
    expect(shown.get('frame 1 0')).toBe(31)
    expect(client.status).toEqual({ kind: 'ready' })
    expect(statuses[0]?.kind === 'starting' || statuses[0]?.kind === 'ready').toBe(true)
    expect(timers.size).toBe(0)
  })

  test('asks one thing at a time; what waits is computed together', async () => {
    const { client, ports, edit, settle } = setUp()
    client.start()
    edit(set(0, 0, 3))
    edit(set(0, 0, 4))
    edit(set(0, 0, 5))
    await settle()
    const applied = ports[0]?.requests.filter(({ kind }) => kind === 'apply')
    expect(applied).toHaveLength(1)
    expect(applied?.[0]).toMatchObject({ operations: [{}, {}, {}] })
  })

  test('tries out, and leaves out try-outs that a newer one made useless', async () => {
    const { client, settle } = setUp()
    await expect(client.tryOut([], ['area'])).rejects.toThrow('not ready')
    client.start()
    await settle()
    const tried = Promise.allSettled([7, 8, 9].map((value) => client.tryOut([set(0, 0, value)], ['area'])))
    const results = await tried
    expect(results.map(({ status }) => status)).toEqual(['fulfilled', 'rejected', 'fulfilled'])
    expect(results[2]).toMatchObject({ value: { area: [90] } })
  })

  test('[E12] a formula that never ends is stopped and named, the rest goes on', async () => {
    const hangs = (request: EngineRequest) =>
      request.kind === 'apply' && JSON.stringify(request.operations).includes('heavy')
    const { client, ports, stops, shown, edit, runOut, settle } = setUp(hangs)
    client.start()
    await settle()
    edit(set(1, 2, '=SUM(A1:A2)+LEN("heavy")', 'price-list'))
    edit(set(0, 0, 6))
    await settle()
    expect(client.status).toEqual({ kind: 'working' })
    runOut()
    await settle()
    expect(ports.map(({ terminated }) => terminated)).toEqual([true, false])
    expect(stops).toEqual([
      'The calculation after the change of Price list C2 took longer than 8 seconds and was stopped.',
    ])
    expect(shown.get('price-list 1 2')).toMatchObject({
      error: '#N/A',
      text: expect.stringMatching(/was stopped/),
    })
    expect(shown.get('frame 0 1')).toBe(60)
    expect(client.status).toEqual({ kind: 'ready' })
    edit(set(0, 0, 7))
    await settle()
    expect(shown.get('frame 0 1')).toBe(70)
  })

  test('[E12] a workbook that cannot be opened is stopped until its content changes', async () => {
    const { client, ports, shown, edit, runOut, settle } = setUp(
      (request, port) => request.kind === 'open' && port === 0,
    )
    client.start()
    runOut()
    expect(client.status).toMatchObject({
      kind: 'stopped',
      text: expect.stringMatching(/longer than 60 seconds.*last values stay/),
    })
    edit({ kind: 'reorder-sheet', sheet: 'frame', to: 1 })
    expect(ports).toHaveLength(1)
    edit(set(0, 0, 4))
    await settle()
    expect(ports).toHaveLength(2)
    expect(shown.get('frame 0 1')).toBe(40)
    expect(client.status).toEqual({ kind: 'ready' })
  })

  test('[E12] a worker that breaks is started again', async () => {
    const { client, ports, shown, edit, settle } = setUp(
      (request, port) => request.kind === 'apply' && port === 0,
    )
    client.start()
    await settle()
    edit(set(0, 0, 8))
    ports[0]?.crash()
    await settle()
    expect(ports).toHaveLength(2)
    expect(shown.get('frame 0 1')).toBe(80)
  })

  test('[E12] a try-out that never ends is refused; late answers of an ended worker are not heard', async () => {
    const { client, shown, runOut, settle } = setUp(
      (request, port) => request.kind === 'try-out' && port === 0,
    )
    client.start()
    await settle()
    const tried = client.tryOut([set(0, 0, 9)], ['area'])
    const refused = expect(tried).rejects.toThrow('Frame A1 took longer')
    runOut()
    await refused
    await settle()
    expect(shown.get('frame 0 1')).toBe(20)
    expect(await client.tryOut([set(0, 0, 9)], ['area'])).toEqual({ area: [90] })
  })

  test('tries many, each on the workbook as it is, and tells of each; waiting try-outs do not push them out', async () => {
    const { client, ports, shown, settle } = setUp()
    client.start()
    await settle()
    const told: unknown[] = []
    const many = client.tryMany(
      [[set(0, 0, 3)], [set(1, 0, '=B1*2')], [], [set(0, 0, 5)]],
      ['area'],
      (index, values) => told.push([index, values.area?.[0]]),
    )
    const other = client.tryOut([set(0, 0, 9)], ['area'])
    expect((await many.result).map(({ area }) => area?.[0])).toEqual([30, 20, 20, 50])
    expect(told).toEqual([
      [0, 30],
      [1, 20],
      [2, 20],
      [3, 50],
    ])
    expect(await other).toEqual({ area: [90] })
    expect(ports[0]?.requests.filter(({ kind }) => kind === 'try-next')).toHaveLength(4)
    expect(shown.get('frame 0 1')).toBe(20)
  })

  test('many end when they are cancelled, and when the workbook changes', async () => {
    const { client, ports, shown, edit, settle } = setUp()
    client.start()
    await settle()
    const lists = [1, 2, 3, 4].map((value) => [set(0, 0, value)])
    const cancelled = client.tryMany(lists, ['area'], (index) => index === 1 && cancelled.cancel())
    await expect(cancelled.result).rejects.toThrow('stopped')
    expect(ports[0]?.requests.filter(({ kind }) => kind === 'try-next').length).toBeLessThan(4)
    const changed = client.tryMany(lists, ['area'], (index) => index === 1 && edit(set(0, 0, 7)))
    await expect(changed.result).rejects.toThrow('workbook changed')
    await settle()
    expect(shown.get('frame 0 1')).toBe(70)
    expect(client.status).toEqual({ kind: 'ready' })
  })

  test('[E12] one of many that never ends is refused, and the engine starts again', async () => {
    const { client, ports, shown, runOut, settle } = setUp(
      (request, port) => request.kind === 'try-next' && port === 0,
    )
    client.start()
    await settle()
    const many = client.tryMany([[set(0, 0, 9)]], ['area'])
    const refused = expect(many.result).rejects.toThrow('took longer')
    await settle()
    runOut()
    await refused
    await settle()
    expect(ports).toHaveLength(2)
    expect(shown.get('frame 0 1')).toBe(20)
  })

  test('closing ends the worker and refuses what waits', async () => {
    const { client, ports, settle, timers } = setUp((request) => request.kind === 'try-out')
    client.start()
    await settle()
    const refused = expect(client.tryOut([], ['area'])).rejects.toThrow('closed')
    client.close()
    await refused
    expect(ports[0]?.terminated).toBe(true)
    expect(timers.size).toBe(0)
  })
})
