import { mkdirSync, renameSync, utimesSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { expect, test } from 'vitest'
import { hashSources, isFresh } from '#api/setup/client-build.mjs'
import { temporaryFolder } from './temporary-folder.ts'

function sources(): string {
  const root = temporaryFolder()
  mkdirSync(path.join(root, 'web/app'), { recursive: true })
  writeFileSync(path.join(root, 'web/app/main.ts'), 'one')
  writeFileSync(path.join(root, 'package-lock.json'), '{}')
  return root
}

const NAMES = ['web', 'package-lock.json', 'not-there.ts']

test('the hash of the sources follows their contents', () => {
  const root = sources()
  const before = hashSources(root, NAMES)
  writeFileSync(path.join(root, 'web/app/main.ts'), 'two')
  expect(hashSources(root, NAMES)).not.toBe(before)
  writeFileSync(path.join(root, 'web/app/main.ts'), 'one')
  expect(hashSources(root, NAMES)).toBe(before)
})

test('the hash of the sources follows their names', () => {
  const root = sources()
  const before = hashSources(root, NAMES)
  renameSync(path.join(root, 'web/app/main.ts'), path.join(root, 'web/app/start.ts'))
  expect(hashSources(root, NAMES)).not.toBe(before)
})

test('the hash of the sources does not follow their times, which a fresh clone sets anew', () => {
  const root = sources()
  const before = hashSources(root, NAMES)
  utimesSync(path.join(root, 'web/app/main.ts'), 1, 1)
  expect(hashSources(root, NAMES)).toBe(before)
})

test('a build is fresh only when it is there and was made from the same sources', () => {
  const build = temporaryFolder()
  const stamp = path.join(build, 'web.stamp')
  expect(isFresh(stamp, 'abc')).toBe(false)
  writeFileSync(stamp, 'abc\n')
  expect(isFresh(stamp, 'abc')).toBe(false)
  mkdirSync(path.join(build, 'web'))
  writeFileSync(path.join(build, 'web/index.html'), '')
  expect(isFresh(stamp, 'abc')).toBe(true)
  expect(isFresh(stamp, 'abd')).toBe(false)
})
