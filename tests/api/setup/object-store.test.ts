import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { statSync } from 'node:fs'
import path from 'node:path'
import { text } from 'node:stream/consumers'
import { expect, test } from 'vitest'
import { readEnv } from '#api/env.ts'
import { createObjectStore } from '#api/files/object-store.ts'
import { startLocalObjectStore } from '#api/setup/object-store.mjs'
import { temporaryFolder } from './temporary-folder.ts'

const KEYS = { accessKey: 'a'.repeat(64), secretKey: 'b'.repeat(64) }
const clientOf = (settings: object) => createObjectStore(readEnv({ DATABASE_URL: 'mysql://a:b@127.0.0.1/c', SESSION_SECRET: 'x'.repeat(32), ...settings }))

test('the local store keeps files in a folder of its user from one start to the next', async () => {
  const folder = path.join(temporaryFolder(), 'objects')
  const first = await startLocalObjectStore({ folder, ...KEYS })
  const before = clientOf(first.settings)
  await before.put('site/one', Buffer.from('kept'), 'text/plain')
  before.close()
  await first.stop()
  expect(statSync(folder).mode & 0o777).toBe(0o700)
  const second = await startLocalObjectStore({ folder, ...KEYS })
  const after = clientOf(second.settings)
  expect(await text(await after.get('site/one'))).toBe('kept')
  expect(await text(await after.get('site/one', { start: 1, end: 2 }))).toBe('ep')
  await expect(after.get('site/none')).rejects.toThrow('cannot be reached')
  after.close()
  await second.stop()
})

test('it lets nobody in without the generated key', async () => {
  const { settings, stop } = await startLocalObjectStore({ folder: temporaryFolder(), ...KEYS })
  const ask = async (headers: Record<string, string>) => (await fetch(`${settings.S3_ENDPOINT}/${settings.S3_BUCKET}`, { headers })).status
  expect(await ask({})).toBe(403)
  expect(await ask({ authorization: 'AWS4-HMAC-SHA256 Credential=S3RVER/20261201/us-east-1/s3/aws4_request, SignedHeaders=host, Signature=00' })).toBe(403)
  const stranger = clientOf({ ...settings, S3_ACCESS_KEY: 'c'.repeat(64) })
  await expect(stranger.put('site/one', Buffer.from('x'), 'text/plain')).rejects.toThrow('cannot be reached')
  stranger.close()
  await stop()
})

test('it ends with the command that started it, even one that was killed, and prints nothing', async () => {
  const script = `
    const { startLocalObjectStore } = await import('#api/setup/object-store.mjs')
    const { settings } = await startLocalObjectStore(${JSON.stringify({ folder: temporaryFolder(), ...KEYS })})
    console.log(settings.S3_ENDPOINT)
    setInterval(() => undefined, 1000)
  `
  const child = spawn(process.execPath, ['--input-type=module', '-e', script], { stdio: ['ignore', 'pipe', 'pipe'] })
  const [printed] = (await once(child.stdout, 'data')) as [Buffer]
  const url = printed.toString().trim()
  expect((await fetch(url)).status).toBe(403)
  const errors = text(child.stderr)
  child.kill('SIGKILL')
  await expect.poll(() => fetch(url).then(() => 'answers', () => 'gone'), { timeout: 10_000 }).toBe('gone')
  expect(await errors).toBe('')
})
