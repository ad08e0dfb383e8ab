import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { runOrFail } from './commands.mjs'
import { waitForLock } from './lock.mjs'
import { BUILD, DATA, ROOT } from './paths.mjs'
import { say } from './say.mjs'

const SOURCES = ['web', 'shared', 'package.json', 'package-lock.json', 'vite.config.ts', 'tsconfig.json']
const STAMP = path.join(BUILD, 'web.stamp')

/** Builds the client unless the last build was made from the very same sources. */
export async function ensureClientBuilt() {
  const wanted = hashSources(ROOT, SOURCES)
  if (isFresh(STAMP, wanted)) return
  const release = await waitForLock(path.join(DATA, 'build.lock'), 'building the client', 300_000)
  try {
    if (isFresh(STAMP, wanted)) return
    say('Building the client: its sources have changed since the last build.')
    await buildClient(wanted)
  } finally {
    release()
  }
}

/** @param {string} [hash] */
export async function buildClient(hash = hashSources(ROOT, SOURCES)) {
  rmSync(STAMP, { force: true })
  const output = await runOrFail(process.execPath, [path.join(ROOT, 'node_modules/vite/bin/vite.js'), 'build', '--logLevel', 'warn'], {
    env: { ...process.env, NODE_ENV: 'production' },
    failure: 'The client could not be built:',
  })
  mkdirSync(BUILD, { recursive: true })
  writeFileSync(STAMP, `${hash}\n`)
  return output
}

/** @param {string} stamp file @param {string} hash @returns {boolean} */
export function isFresh(stamp, hash) {
  if (!existsSync(stamp) || !existsSync(path.join(path.dirname(stamp), 'web/index.html'))) return false
  return readFileSync(stamp, 'utf8').trim() === hash
}

/**
 * One hash over names and contents, so that a checkout of an older commit counts as changed whatever its file times say.
 * @param {string} root
 * @param {string[]} sources files and folders below root
 * @returns {string}
 */
export function hashSources(root, sources) {
  const hash = createHash('sha256')
  for (const file of sources.flatMap((source) => listFiles(root, source))) {
    hash.update(`${file}\0`).update(createHash('sha256').update(readFileSync(path.join(root, file))).digest())
  }
  return hash.digest('hex')
}

/** @param {string} root @param {string} source @returns {string[]} */
function listFiles(root, source) {
  const full = path.join(root, source)
  if (!existsSync(full)) return []
  if (!statSync(full).isDirectory()) return [source]
  return readdirSync(full).sort().flatMap((name) => listFiles(root, path.join(source, name)))
}
