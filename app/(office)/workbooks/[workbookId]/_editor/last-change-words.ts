import { changedWords } from '../../_list/words'
import type { LastChange } from './last-changes'
import type { WorkbookSession } from './session-contract'

/** "changed by you, 3 minutes ago"; another person's name is said where it is known here. */
export function lastChangeWords(
  session: WorkbookSession,
  change: LastChange | undefined,
  now: Date,
): string | undefined {
  if (!change) return undefined
  const when = changedWords(new Date(change.at), now)
  return change.author === session.actor.id ? `changed by you, ${when}` : `changed ${when}`
}
