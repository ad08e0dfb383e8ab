import { mkdirSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { expect, test } from 'vitest'
import { checkNode, findMismatch } from '#api/setup/packages.mjs'
import { temporaryFolder } from './temporary-folder.ts'

type Packages = Record<string, { version?: string; integrity?: string; optional?: boolean }>

const WANTED: Packages = {
  '': {},
  'node_modules/@scope/one': { version: '1.0.0', integrity: 'sha512-1' },
  'node_modules/two': { version: '2.0.0', integrity: 'sha512-2' },
  'node_modules/for-another-machine': { version: '3.0.0', integrity: 'sha512-3', optional: true },
}

function checkout(present: Packages | null, folders: string[] = Object.keys(present ?? {})): string {
  const root = temporaryFolder()
  writeFileSync(path.join(root, 'package-lock.json'), JSON.stringify({ packages: WANTED }))
  if (present === null) return root
  for (const folder of folders) mkdirSync(path.join(root, folder), { recursive: true })
  mkdirSync(path.join(root, 'node_modules'), { recursive: true })
  writeFileSync(path.join(root, 'node_modules/.package-lock.json'), JSON.stringify({ packages: present }))
  return root
}

const ONE = { 'node_modules/@scope/one': { version: '1.0.0', integrity: 'sha512-1' } }
const TWO = { 'node_modules/two': { version: '2.0.0', integrity: 'sha512-2' } }

test('packages that are all there need no npm ci, optional ones of another machine aside', () => {
  expect(findMismatch(checkout({ ...ONE, ...TWO }))).toBe(null)
})

test.each([
  ['a fresh clone', null, undefined, 'none are installed yet'],
  ['a package that is not installed', ONE, undefined, 'two is not installed'],
  ['another version', { ...ONE, 'node_modules/two': { version: '2.0.1', integrity: 'sha512-9' } }, undefined, 'two is not the version in package-lock.json'],
  ['a removed folder', { ...ONE, ...TWO }, ['node_modules/two'], '@scope/one is gone from node_modules'],
  ['a package nobody asked for', { ...ONE, ...TWO, 'node_modules/four': { version: '4.0.0' } }, undefined, 'four is not in package-lock.json'],
])('%s needs npm ci', (_case, present, folders, reason) => {
  expect(findMismatch(checkout(present, folders))).toBe(reason)
})

test('Node before 20.19 is refused with what is needed', () => {
  expect(() => checkNode('18.20.4')).toThrow('Hardpan needs Node 20.19 or a later Node 20; this is Node 18.20.4.')
  expect(() => checkNode('20.18.3')).toThrow('this is Node 20.18.3')
  expect(() => checkNode('20.19.0')).not.toThrow()
})
