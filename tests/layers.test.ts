import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { builtinModules } from 'node:module'
import path from 'node:path'
import ts from 'typescript'
import { expect, test } from 'vitest'

const ROOT = path.resolve(import.meta.dirname, '..')
const LAYERS = ['api', 'seed', 'shared', 'tests', 'web'].filter((layer) => existsSync(path.join(ROOT, layer)))
const LONGEST_FILE = 300

interface SourceFile {
  /** Path from the root of the checkout, with slashes. */
  file: string
  lines: number
  /** What it imports: a path from the root for our own files, the package's name otherwise. */
  imports: string[]
}

function listFiles(folder: string): string[] {
  return readdirSync(path.join(ROOT, folder), { withFileTypes: true }).flatMap((entry) => {
    const file = `${folder}/${entry.name}`
    return entry.isDirectory() ? listFiles(file) : [file]
  })
}

function resolveImport(file: string, specifier: string): string {
  if (specifier.startsWith('#')) return specifier.slice(1)
  return specifier.startsWith('.') ? path.posix.join(path.posix.dirname(file), specifier) : specifier
}

function readSource(file: string): SourceFile {
  const text = readFileSync(path.join(ROOT, file), 'utf8')
  const { importedFiles } = ts.preProcessFile(text, true, true)
  return { file, lines: text.split('\n').length - 1, imports: importedFiles.map((found) => resolveImport(file, found.fileName)) }
}

const allFiles = LAYERS.flatMap(listFiles)
const sources = allFiles.filter((file) => /\.(ts|tsx|mjs)$/.test(file)).map(readSource)

/** Every import of the files below `from` that `isForbidden` refuses, as "file imports target". */
function violations(from: string, isForbidden: (target: string, file: string) => boolean): string[] {
  return sources
    .filter(({ file }) => file.startsWith(from))
    .flatMap(({ file, imports }) => imports.filter((target) => isForbidden(target, file)).map((target) => `${file} imports ${target}`))
}

const isIn = (target: string, ...folders: string[]): boolean => folders.some((folder) => target.startsWith(`${folder}/`))
const isNode = (target: string): boolean => target.startsWith('node:') || builtinModules.includes(target)
const featureOf = (file: string): string => file.split('/')[2] ?? ''

test('shared/ imports nothing from api, web, seed or tests, because both sides stand on it', () => {
  expect(violations('shared/', (target) => isIn(target, 'api', 'web', 'seed', 'tests'))).toEqual([])
})

test('shared/ imports no Node, React, database or network package, because it must compute the same everywhere', () => {
  const outside = /^(react|react-dom|express|typeorm|mysql2|socket\.io|socket\.io-client|maplibre-gl)(\/|$)/
  expect(violations('shared/', (target) => isNode(target) || outside.test(target))).toEqual([])
})

test('web/ never imports api, not even types, because the contract between them is shared/schemas', () => {
  expect(violations('web/', (target) => isIn(target, 'api', 'seed', 'tests') || isNode(target))).toEqual([])
})

test('api/ never imports web or tests, because the server runs without them', () => {
  expect(violations('api/', (target) => isIn(target, 'web', 'tests'))).toEqual([])
})

test('seed/ imports neither web nor tests, because it runs in the server', () => {
  expect(violations('seed/', (target) => isIn(target, 'web', 'tests'))).toEqual([])
})

test('no feature of the client imports another, so that each can be deleted as one folder', () => {
  const isOther = (target: string, file: string): boolean => isIn(target, 'web/features') && featureOf(target) !== featureOf(file)
  expect(violations('web/features/', isOther)).toEqual([])
})

test('features import of the app only its paths, because the app imports the features', () => {
  expect(violations('web/features/', (target) => isIn(target, 'web/app') && !/^web\/app\/paths\b/.test(target))).toEqual([])
})

test('building blocks of the client import no feature and nothing of the app, because both are built from them', () => {
  for (const folder of ['web/components/', 'web/lib/']) {
    expect(violations(folder, (target) => isIn(target, 'web/features', 'web/app'))).toEqual([])
  }
})

test('imports that leave their folder go through the # aliases and name the file with its extension', () => {
  const crooked = sources.flatMap(({ file }) => {
    const { importedFiles } = ts.preProcessFile(readFileSync(path.join(ROOT, file), 'utf8'), true, true)
    const names = importedFiles.map((found) => found.fileName).filter((name) => /^[.#]/.test(name))
    return names.filter((name) => name.startsWith('..') || path.extname(name) === '').map((name) => `${file} imports ${name}`)
  })
  expect(crooked).toEqual([])
})

test(`no file outside tests/ is longer than ${LONGEST_FILE} lines: split it by resource first, by verb second`, () => {
  const long = sources.filter(({ file, lines }) => !file.startsWith('tests/') && lines > LONGEST_FILE)
  expect(long.map(({ file, lines }) => `${file} has ${lines} lines`)).toEqual([])
})

test('every source file is named in kebab-case', () => {
  const isKebab = (name: string): boolean => /^[a-z0-9]+(-[a-z0-9]+)*(\.[a-z0-9]+(-[a-z0-9]+)*)*$/.test(name)
  expect(allFiles.filter((file) => !file.split('/').every(isKebab))).toEqual([])
})

test('nothing is exported as default, so that one thing has one name everywhere', () => {
  const own = sources.filter(({ file }) => !file.endsWith('.d.ts'))
  const found = own.filter(({ file }) => /^export default\b/m.test(readFileSync(path.join(ROOT, file), 'utf8')))
  expect(found.map(({ file }) => file)).toEqual([])
})

test('the reader of imports sees every form of import', () => {
  const text = "import a from './a.ts'\nimport type { B } from '#shared/b.ts'\nexport * from './c.ts'\nconst d = await import('node:fs')\n"
  expect(ts.preProcessFile(text, true, true).importedFiles.map((found) => found.fileName)).toEqual(['./a.ts', '#shared/b.ts', './c.ts', 'node:fs'])
})
