import { randomUUID } from 'node:crypto'
import { foundFirm } from '../../db/access/firms'
import { actorOf, addMember, signIn } from '../../db/access/members'
import { createWorkbook } from '../../db/access/workbooks'
import type { Result } from '../../lib/failures'
import { otherFirm } from './sign-ins'

/** The second firm: one member of each role and one workbook. Made once a database. */
export async function seedOtherFirm(): Promise<void> {
  const { password, emails, workbook } = otherFirm
  const owner = { id: randomUUID(), email: emails.owner, name: 'Other Owner', password }
  value(await foundFirm({ id: otherFirm.id, name: 'Elsewhere Coverings (made up)', owner }))
  const session = value(await signIn({ email: emails.owner, password, address: 'seed' }))
  const actor = value(await actorOf(session.sessionToken))
  for (const role of ['manager', 'estimator', 'viewer'] as const) {
    value(await addMember(actor, { email: emails[role], name: `Other ${role}`, role, password }))
  }
  const request = { title: workbook.title, frame: 'gable', system: 'us' as const }
  value(await createWorkbook(actor, request, { now: () => new Date(), newId: () => workbook.id }))
}

function value<T>(result: Result<T>): T {
  if (result.ok) return result.value
  throw new Error(result.failure.text)
}
