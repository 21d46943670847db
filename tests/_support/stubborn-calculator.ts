import type { AnswerMessage, JobMessage } from '@/app/_server/calculator/jobs'

/** Stands where the calculator's process does and misbehaves as the job's title says; values it never computes. */
process.on('disconnect', () => process.exit(0))

process.on('message', ({ id, job }: JobMessage) => {
  const title = job.kind === 'xlsx' ? job.title : ''
  if (title === 'die') process.exit(3)
  if (job.kind === 'values') for (;;);
  if (title === 'silent') return
  const answer: AnswerMessage =
    title === 'throw' ? { id, ok: false, detail: 'inside' } : { id, ok: true, answer: { bytes: process.pid } }
  process.send?.(answer)
})
