import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { existsSync, readdirSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { expect, test } from 'vitest'
import { lockHolder, tryLock, waitForLock } from '#api/setup/lock.mjs'
import { temporaryFolder } from './temporary-folder.ts'

test('a second taker is told who holds the lock and what for', () => {
  const file = path.join(temporaryFolder(), 'start.lock')
  expect(tryLock(file, 'running Hardpan')).toHaveProperty('release')
  expect(tryLock(file, 'running Hardpan')).toEqual({ holder: { pid: process.pid, about: 'running Hardpan' } })
  expect(lockHolder(file)).toEqual({ pid: process.pid, about: 'running Hardpan' })
})

test('a released lock is free and leaves no file', () => {
  const folder = temporaryFolder()
  const file = path.join(folder, 'start.lock')
  const taken = tryLock(file, 'a test')
  if ('release' in taken) taken.release()
  expect(readdirSync(folder)).toEqual([])
  expect(lockHolder(file)).toBe(null)
})

test('a lock left by a process that has ended is taken over', async () => {
  const ended = spawn(process.execPath, ['-e', ''])
  await once(ended, 'exit')
  const file = path.join(temporaryFolder(), 'start.lock')
  writeFileSync(file, JSON.stringify({ pid: ended.pid, about: 'gone' }))
  expect(tryLock(file, 'a test')).toHaveProperty('release')
  expect(lockHolder(file)?.pid).toBe(process.pid)
})

test.each(['', 'not JSON', '{"pid":-1}'])('a lock file that says %j is taken over', (content) => {
  const file = path.join(temporaryFolder(), 'start.lock')
  writeFileSync(file, content)
  expect(tryLock(file, 'a test')).toHaveProperty('release')
})

test('waiting for a lock goes on when it is released', async () => {
  const file = path.join(temporaryFolder(), 'packages.lock')
  const first = tryLock(file, 'installing packages')
  setTimeout(() => 'release' in first && first.release(), 100)
  const release = await waitForLock(file, 'installing packages', 5_000)
  release()
  expect(existsSync(file)).toBe(false)
})

test('waiting for a lock ends when its holder takes too long', async () => {
  const file = path.join(temporaryFolder(), 'packages.lock')
  tryLock(file, 'installing packages')
  await expect(waitForLock(file, 'installing packages', 0)).rejects.toThrow(`Process ${process.pid} still holds ${file}.`)
})
