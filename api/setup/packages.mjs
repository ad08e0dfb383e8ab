import { existsSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { runOrFail } from './commands.mjs'
import { waitForLock } from './lock.mjs'
import { DATA, inRoot, ROOT } from './paths.mjs'
import { say, SetupError } from './say.mjs'

/** @typedef {Record<string, { version?: string, integrity?: string, optional?: boolean, peer?: boolean }>} Packages */

/** Refuses a Node this code cannot run on. @param {string} version as process.versions.node */
export function checkNode(version) {
  const [major = 0, minor = 0] = version.split('.').map(Number)
  if (major > 20 || (major === 20 && minor >= 19)) return
  throw new SetupError(`Hardpan needs Node 20.19 or a later Node 20; this is Node ${version}.`)
}

/** Runs npm ci when node_modules is not what the lockfile says. */
export async function ensurePackages() {
  if (findMismatch(ROOT) === null) return
  const release = await waitForLock(path.join(DATA, 'packages.lock'), 'installing packages', 600_000)
  try {
    // Another command may have done it while this one waited.
    const mismatch = findMismatch(ROOT)
    if (mismatch === null) return
    say(`Installing npm packages: ${mismatch}.`)
    const npm = process.env.npm_execpath
    const [program, first] = npm?.endsWith('.js') ? [process.execPath, [npm]] : ['npm', []]
    await runOrFail(program, [...first, 'ci', '--include=dev', '--no-audit', '--no-fund'], { failure: 'npm ci failed:' })
  } finally {
    release()
  }
}

/**
 * Why node_modules is not what the lockfile says, null when it is.
 * @param {string} root folder with package-lock.json
 * @returns {string | null}
 */
export function findMismatch(root) {
  const wanted = readPackages(path.join(root, 'package-lock.json'))
  if (wanted === null) throw new SetupError(`${inRoot('package-lock.json')} cannot be read.`)
  const present = readPackages(path.join(root, 'node_modules/.package-lock.json'))
  if (present === null) return 'none are installed yet'
  for (const [folder, entry] of Object.entries(wanted)) {
    if (folder === '') continue
    const found = present[folder]
    if (found === undefined) {
      if (entry.optional) continue
      return `${nameOf(folder)} is not installed`
    }
    if (found.version !== entry.version || found.integrity !== entry.integrity) return `${nameOf(folder)} is not the version in package-lock.json`
    if (!existsSync(path.join(root, folder))) return `${nameOf(folder)} is gone from node_modules`
  }
  const extra = Object.keys(present).find((folder) => !(folder in wanted))
  return extra === undefined ? null : `${nameOf(extra)} is not in package-lock.json`
}

/** @param {string} folder */
const nameOf = (folder) => folder.slice(folder.lastIndexOf('node_modules/') + 'node_modules/'.length)

/** @param {string} file @returns {Packages | null} */
function readPackages(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8')).packages ?? null
  } catch {
    return null
  }
}
