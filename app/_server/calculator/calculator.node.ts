import type { AnswerMessage, JobMessage } from './jobs'
import { perform } from './perform'

/** The child process of `calculator.ts`: takes a job, answers it, and ends when its parent does. */
process.on('disconnect', () => process.exit(0))

process.on('message', (message: JobMessage) => {
  perform(message.job).then(
    (answer) => send({ id: message.id, ok: true, answer }),
    (error: unknown) =>
      send({
        id: message.id,
        ok: false,
        detail: error instanceof Error ? (error.stack ?? error.message) : String(error),
      }),
  )
})

function send(answer: AnswerMessage): void {
  process.send?.(answer)
}
