import { parentPort } from 'node:worker_threads'
import { serveEngine } from '../../../../lib/workbook/engine'
import type { EngineRequest } from '../../../../lib/workbook/engine/protocol'

/** The engine in a thread of its own, as the browser's worker has it. */
serveEngine({
  post: (reply, transfer) => parentPort?.postMessage(reply, transfer),
  onMessage: (listener) => parentPort?.on('message', (request: EngineRequest) => listener(request)),
})
