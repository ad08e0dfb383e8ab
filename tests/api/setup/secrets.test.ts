import { statSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { expect, test } from 'vitest'
import { readOrCreateSecret } from '#api/setup/secrets.mjs'
import { readSessionSecret } from '#api/setup/server-settings.mjs'
import { temporaryFolder } from './temporary-folder.ts'

test('a secret is made once, kept, and readable by its user only', () => {
  const file = path.join(temporaryFolder(), 'session-secret')
  const secret = readOrCreateSecret(file)
  expect(secret).toMatch(/^[0-9a-f]{64}$/)
  expect(readOrCreateSecret(file)).toBe(secret)
  expect(statSync(file).mode & 0o777).toBe(0o600)
})

test('a secret file that was emptied is refused, not used', () => {
  const file = path.join(temporaryFolder(), 'session-secret')
  writeFileSync(file, '')
  expect(() => readOrCreateSecret(file)).toThrow(`${file} does not hold a generated secret.`)
})

test.each(['DATABASE_URL', 'REDIS_URL'])('with %s the session secret must be given, because several servers share it', (name) => {
  const file = path.join(temporaryFolder(), 'session-secret')
  expect(() => readSessionSecret({ [name]: 'x' }, file)).toThrow(`${name} is set, so SESSION_SECRET must be set too`)
  expect(readSessionSecret({ [name]: 'x', SESSION_SECRET: 'given' }, file)).toBe('given')
})
