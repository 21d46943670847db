import { hash, verify } from '@node-rs/argon2'
import { fail, type Result, succeed } from '../../lib/failures'

/** argon2id with 19 MiB, two passes, one lane (OWASP Password Storage Cheat Sheet's least setting for it). */
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 }

/** NIST SP 800-63B 5.1.1.2: 8 characters at least, 64 and more allowed, no rules on their kinds. */
export const passwordLength = { least: 8, most: 256 } as const

export async function hashPassword(password: string): Promise<Result<string>> {
  const { least, most } = passwordLength
  const length = [...password].length
  if (length < least || length > most) {
    return fail('invalid', `A password has ${least} to ${most} characters.`, { name: 'password' })
  }
  return succeed(await hash(password.normalize('NFC'), cost))
}

let stranger: Promise<string> | undefined

/** With no hash (nobody has that e-mail address) it takes as long as with one, and says no. */
export async function passwordMatches(password: string, stored: string | undefined): Promise<boolean> {
  stranger ??= hash('nobody has this password', cost)
  const against = stored ?? (await stranger)
  const matches = await verify(against, password.slice(0, passwordLength.most * 2).normalize('NFC'))
  return matches && stored !== undefined
}
