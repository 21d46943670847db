import { fail, type Result, succeed } from '../../lib/failures'
import { database, withFirm } from '../connection'
import { insertFirm, insertMember } from '../repositories/members'
import { attempt } from './attempt'
import { foldEmail } from './members'
import { hashPassword } from './passwords'

export interface NewFirm {
  readonly id: string
  readonly name: string
  readonly owner: {
    readonly id: string
    readonly email: string
    readonly name: string
    readonly password: string
  }
}

/** Founds a firm with its first owner, both or neither. `invalid` when the firm or the e-mail address is there already. */
export function foundFirm(firm: NewFirm): Promise<Result<void>> {
  return attempt(async () => {
    const hashed = await hashPassword(firm.owner.password)
    if (!hashed.ok) return hashed
    try {
      await withFirm(database(), firm.id, async (trx) => {
        if (!(await insertFirm(trx, { id: firm.id, name: firm.name }))) throw new Taken('id', 'id')
        const owner = {
          firmId: firm.id,
          id: firm.owner.id,
          email: foldEmail(firm.owner.email),
          name: firm.owner.name,
          role: 'owner' as const,
          passwordHash: hashed.value,
        }
        if (!(await insertMember(trx, owner))) throw new Taken('email', 'e-mail address')
      })
      return succeed(undefined)
    } catch (error) {
      if (error instanceof Taken) return fail('invalid', error.message, { name: error.part })
      throw error
    }
  })
}

/** Thrown inside the transaction so that it rolls back; never leaves this file. */
class Taken extends Error {
  constructor(
    readonly part: 'id' | 'email',
    what: string,
  ) {
    super(`Another firm has that ${what} already.`)
  }
}
