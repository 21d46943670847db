import { closeDatabase } from '@/db/connection'
import { closeCalculator } from './calculator/calculator'
import { stopKeeping } from './calculator/keep-values'
import { log } from './log'

/** On SIGTERM: the calculator's process ends with ours, and the database pool lets its connections go. */
export function closeOnTerminate(): void {
  process.once('SIGTERM', () => {
    log('info', { event: 'closing' })
    stopKeeping()
    closeCalculator()
    void closeDatabase()
  })
}
