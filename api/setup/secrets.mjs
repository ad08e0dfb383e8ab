import { randomBytes } from 'node:crypto'
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { SetupError } from './say.mjs'

/**
 * A generated secret kept in a file only this user may read.
 * @param {string} file
 * @returns {string} hexadecimal
 */
export function readOrCreateSecret(file) {
  mkdirSync(path.dirname(file), { recursive: true, mode: 0o700 })
  try {
    writeFileSync(file, `${randomBytes(32).toString('hex')}\n`, { mode: 0o600, flag: 'wx' })
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EEXIST') throw error
  }
  const secret = readFileSync(file, 'utf8').trim()
  if (/^[0-9a-f]{64}$/.test(secret)) return secret
  throw new SetupError(`${file} does not hold a generated secret. Remove it, and a new one is made.`)
}
