import type { Engine } from '../contracts'
import { transferOf } from '../values/packed'
import { createEngine } from './create-engine'
import type { EngineReply, EngineRequest, ServerPort } from './protocol'

/** Answers requests on a port, one after another. The worker's entry file calls it with its own `postMessage`. */
export function serveEngine(port: ServerPort): void {
  let engine: Engine | undefined
  port.onMessage((request) => {
    try {
      const { reply, transfer } = answer(request)
      port.post(reply, transfer)
    } catch (error) {
      const message = error instanceof Error ? `${error.message}\n${error.stack ?? ''}` : String(error)
      port.post({ kind: 'failed', seq: request.seq, message }, [])
    }
  })

  function answer(request: EngineRequest): { reply: EngineReply; transfer: ArrayBuffer[] } {
    const { seq } = request
    if (request.kind === 'open') {
      engine?.destroy()
      engine = createEngine(request.workbook, { stopped: request.stopped })
      const values = engine.all()
      return { reply: { kind: 'opened', seq, values }, transfer: transferOf(values) }
    }
    if (!engine) throw new Error('a workbook must be opened first')
    if (request.kind === 'apply') {
      const changes = engine.apply(request.operations)
      return { reply: { kind: 'applied', seq, changes }, transfer: transferOf(changes) }
    }
    const { operations, names } = request
    const values =
      request.kind === 'try-next' ? engine.tryNext(operations, names) : engine.tryOut(operations, names)
    return { reply: { kind: 'tried', seq, values }, transfer: [] }
  }
}
