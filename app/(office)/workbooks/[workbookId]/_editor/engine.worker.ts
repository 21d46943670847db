import type { EngineRequest } from '@/lib/workbook'
import { serveEngine } from '@/lib/workbook/engine'

/** The worker's entry: the only place in the browser where the formula engine is loaded. */
const scope = self as unknown as DedicatedWorkerGlobalScope

serveEngine({
  post: (reply, transfer) => scope.postMessage(reply, transfer),
  onMessage: (listener) => {
    scope.addEventListener('message', (event: MessageEvent<EngineRequest>) => listener(event.data))
  },
})
