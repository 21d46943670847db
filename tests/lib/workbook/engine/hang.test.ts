import { fileURLToPath } from 'node:url'
import { Worker } from 'node:worker_threads'
import { expect, test } from 'vitest'
import {
  applyOperation,
  type ClientPort,
  createEngineClient,
  type EngineReply,
  fromJson,
  toJson,
  unpack,
} from '@/lib/workbook'

function spawn(): ClientPort {
  const entry = fileURLToPath(new URL('./hang-worker.ts', import.meta.url))
  const worker = new Worker(`require('tsx/cjs'); require(${JSON.stringify(entry)})`, { eval: true })
  return {
    post: (request) => worker.postMessage(request),
    onMessage: (listener) => void worker.on('message', (reply: EngineReply) => listener(reply)),
    onError: (listener) => void worker.on('error', (error) => listener(error.message)),
    terminate: () => void worker.terminate(),
  }
}

test('[E12] a real calculation without end in sight is stopped, named, and the values come back', async () => {
  const column = Array.from({ length: 8 }, () => ({}))
  const workbook = fromJson({
    version: 1,
    system: 'si',
    sheets: [
      {
        id: 'frame',
        name: 'Frame',
        kind: 'step',
        rowCount: 20_000,
        columns: column,
        cells: [
          [0, 0, { input: 2 }],
          [0, 1, { input: '=A1*10' }],
          ...Array.from({ length: 5_000 }, (_, row) => [row, 2, { input: row }] as const),
        ],
      },
    ],
    names: [],
  })
  const shown = new Map<string, unknown>()
  let stopped = (_text: string) => {}
  let ready = () => {}
  const client = createEngineClient({
    spawn,
    setTimer: (milliseconds, run) => {
      const timer = setTimeout(run, milliseconds)
      return () => clearTimeout(timer)
    },
    workbook: () => toJson(workbook),
    onValues: (packed) => unpack(packed, ({ row, column: c }, value) => shown.set(`${row} ${c}`, value)),
    onStatus: (status) => {
      if (status.kind === 'ready') ready()
      if (status.kind === 'stopped') throw new Error(status.text)
    },
    onStopped: (text) => stopped(text),
    patience: { open: 60_000, answer: 2_000 },
  })
  const opened = new Promise<void>((resolve) => {
    ready = resolve
  })
  client.start()
  await opened
  expect(shown.get('0 1')).toBe(20)

  const words = new Promise<string>((resolve) => {
    stopped = resolve
  })
  // Each of 5,000 cells compares the 5,000 of column C twice, as texts: fifty million comparisons.
  const operation = {
    kind: 'set-cells' as const,
    sheet: 'frame',
    cells: Array.from({ length: 5_000 }, (_, row) => ({
      row,
      column: 3,
      input: `=SUMPRODUCT((C$1:C$5000&"x">="${row}")*(C$1:C$5000&"y"<"z${row}"))`,
    })),
  }
  expect(applyOperation(workbook, operation).ok).toBe(true)
  client.apply([operation])
  expect(await words).toBe(
    'The calculation after the change of Frame D1 took longer than 2 seconds and was stopped.',
  )
  await new Promise<void>((resolve) => {
    ready = resolve
  })
  expect(shown.get('0 1')).toBe(20)
  expect(shown.get('0 3')).toMatchObject({ error: '#N/A' })
  client.close()
}, 120_000)
