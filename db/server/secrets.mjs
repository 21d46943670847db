import { randomBytes } from 'node:crypto'
import { join } from 'node:path'
import { ensureDataFolder, Obstacle, readJson, writePrivateJson } from './project.mjs'

/**
 * Secrets that the web server needs, made at the first start and kept; the environment's own come first.
 * @returns {Record<string, string>}
 */
export function ensureSecrets() {
  const file = join(ensureDataFolder(), 'secrets.json')
  const known = readJson(file) ?? {}
  const secrets = { ...known }
  secrets.AUTH_SECRET ??= randomBytes(32).toString('base64url')
  // The same across restarts and builds, so that a page opened before one can still send its forms.
  secrets.NEXT_SERVER_ACTIONS_ENCRYPTION_KEY ??= randomBytes(32).toString('base64')
  if (Object.keys(secrets).length !== Object.keys(known).length) writePrivateJson(file, secrets)
  for (const name of Object.keys(secrets)) {
    const given = process.env[name]
    if (given === undefined) continue
    if (given.length < 32)
      throw new Obstacle(`${name} is shorter than 32 characters. Unset it, or give a longer one.`)
    secrets[name] = given
  }
  return secrets
}
