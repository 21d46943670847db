import { fromJson, quantityWarnings, type WorkbookJson } from '@/lib/workbook'

/** Reads every formula of a workbook for mixed kinds of quantity: long enough a task to be kept off the window. */
const scope = self as unknown as DedicatedWorkerGlobalScope

scope.addEventListener('message', (event: MessageEvent<WorkbookJson>) => {
  scope.postMessage(quantityWarnings(fromJson(event.data)))
})
