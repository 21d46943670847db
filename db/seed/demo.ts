import { randomUUID } from 'node:crypto'
import { computed } from '../../lib/estimate/computed'
import type { Result } from '../../lib/failures'
import { fromJson } from '../../lib/workbook'
import { createEngine } from '../../lib/workbook/engine'
import { foundFirm } from '../access/firms'
import { type Actor, actorOf, addMember, newMemberSchema, signIn, signOut } from '../access/members'
import { createWorkbook, openWorkbook, saveSnapshot } from '../access/workbooks'
import demo from './demo.json'
import { demoWorkbooks } from './demo-workbooks'

const roleSchema = newMemberSchema.shape.role

/**
 * The demo: a firm, people and three workbooks of our own invention, in a made-up county. Made through `db/access`
 * alone, under fixed ids, so that a second run finds everything and changes nothing.
 * Gives a line for each thing made.
 */
export async function seedDemo(): Promise<readonly string[]> {
  const [owner, ...others] = demo.members
  if (!owner) throw new Error('demo.json names nobody')
  const made: string[] = []
  const { password, firm } = demo
  const founded = await foundFirm({ ...firm, owner: { ...owner, password } })
  if (founded.ok) made.push(`Made the firm ${firm.name}`)
  else if (founded.failure.name !== 'id') throw new Error(founded.failure.text)
  await as(owner.email, async (actor) => {
    for (const member of others) {
      const { id, email, name } = member
      const added = await addMember(actor, { email, name, role: roleSchema.parse(member.role), password }, id)
      if (added.ok) made.push(`Made ${email}`)
      else if (added.failure.name !== 'email') throw new Error(`${email}: ${added.failure.text}`)
    }
  })
  await as('estimator@larkfold.example', async (actor) => {
    for (const { id, ...request } of demoWorkbooks) {
      const created = await createWorkbook(actor, request, { now: () => new Date(), newId: () => id })
      if (created.ok) {
        await computeValues(actor, id)
        made.push(`Made the workbook “${request.title}”`)
      } else if (created.failure.name !== 'id') throw new Error(`${request.title}: ${created.failure.text}`)
    }
  })
  return made
}

/** The list shows its figures, and it opens with its values, from the first time on. */
async function computeValues(actor: Actor, id: string): Promise<void> {
  const { seq, snapshot } = value(await openWorkbook(actor, id))
  const workbook = fromJson(snapshot.workbook)
  const engine = createEngine(workbook)
  const { values, tally } = computed(workbook, engine)
  engine.destroy()
  value(await saveSnapshot(actor, id, { seq, values, tally: { ...tally } }))
}

async function as(email: string, work: (actor: Actor) => Promise<void>): Promise<void> {
  // A place of its own: the seed's sign-ins say nothing about where people sign in from.
  const signedIn = value(await signIn({ email, password: demo.password, address: `seed ${randomUUID()}` }))
  try {
    await work(value(await actorOf(signedIn.sessionToken)))
  } finally {
    await signOut(signedIn.sessionToken)
  }
}

function value<T>(result: Result<T>): T {
  if (result.ok) return result.value
  throw new Error(result.failure.text)
}
