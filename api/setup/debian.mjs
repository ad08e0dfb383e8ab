import { setTimeout as sleep } from 'node:timers/promises'
import { findProgram, isProgram, lastLines, run } from './commands.mjs'
import { say, SetupError } from './say.mjs'

/** @typedef {{ program: string, debianPackage: string, purpose: string }} Need */

/** @type {Need[]} */
export const DATABASE_NEEDS = [
  { program: 'mariadbd', debianPackage: 'mariadb-server-core', purpose: 'the database' },
  { program: 'mariadb-install-db', debianPackage: 'mariadb-server-core', purpose: 'the database' },
  { program: 'mariadb', debianPackage: 'mariadb-client', purpose: 'the database' },
  { program: 'mariadb-admin', debianPackage: 'mariadb-client', purpose: 'the database' },
]

/** @type {Need} */
export const CHROMIUM_NEED = { program: 'chromium', debianPackage: 'chromium', purpose: 'the browser tests' }

const LOCK_WAIT_SECONDS = 180

/**
 * Installs from Debian what is missing, and calls apt only then.
 * @param {Need[]} needs
 * @param {(program: string) => string | null} [find]
 */
export async function ensurePrograms(needs, find = findProgram) {
  const missing = needs.filter((need) => find(need.program) === null)
  if (missing.length === 0) return
  const packages = [...new Set(missing.map((need) => need.debianPackage))]
  const purposes = [...new Set(missing.map((need) => need.purpose))].join(' and ')
  const apt = find('apt-get')
  const prefix = apt === null ? null : await asRoot()
  if (apt === null || prefix === null) throw new SetupError(missingMessage(missing, packages, apt !== null))
  say(`Installing ${packages.join(', ')} from Debian: needed for ${purposes}, not on this machine yet.`)
  const update = await updateLists(prefix, apt)
  const install = await aptGet(prefix, apt, ['install', '-y', '--no-install-recommends', ...packages])
  if (install.code !== 0) {
    const reason = update.code === 0 ? install.output : `${update.output}\n${install.output}`
    throw new SetupError(`apt-get could not install ${packages.join(', ')}:\n${lastLines(reason, 15)}`)
  }
  const still = needs.filter((need) => find(need.program) === null)
  if (still.length > 0) throw new SetupError(missingMessage(still, packages, true))
}

/** The browser for the tests: CHROMIUM_PATH when given, Debian's otherwise. @param {NodeJS.ProcessEnv} env */
export async function ensureChromium(env) {
  if (env.CHROMIUM_PATH === undefined || env.CHROMIUM_PATH === '') return ensurePrograms([CHROMIUM_NEED])
  if (!isProgram(env.CHROMIUM_PATH)) throw new SetupError(`CHROMIUM_PATH is ${env.CHROMIUM_PATH}, which is not a program.`)
}

/** @param {Need[]} missing @param {string[]} packages @param {boolean} hasApt @returns {string} */
export function missingMessage(missing, packages, hasApt) {
  const names = missing.map((need) => need.program).join(', ')
  const remedy = hasApt
    ? `This user may not install packages. Run: sudo apt-get install -y --no-install-recommends ${packages.join(' ')}`
    : `This is not a Debian machine: install MariaDB 10.11 or later and Chromium by its own means, or name what you have in DATABASE_URL and CHROMIUM_PATH.`
  return `Missing on this machine: ${names}.\n${remedy}`
}

/** Words to put before a command so that it runs as root; null when this user may not. @returns {Promise<string[] | null>} */
async function asRoot() {
  if (process.getuid?.() === 0) return []
  const sudo = findProgram('sudo')
  if (sudo === null) return null
  return (await run(sudo, ['-n', 'true'])).code === 0 ? [sudo, '-n'] : null
}

/** The lists' own lock has no time-out option, so waiting for it is done here. @param {string[]} prefix @param {string} apt */
async function updateLists(prefix, apt) {
  const deadline = Date.now() + LOCK_WAIT_SECONDS * 1000
  for (;;) {
    const result = await aptGet(prefix, apt, ['update'])
    if (result.code === 0 || !/Could not get lock|Unable to lock/.test(result.output) || Date.now() > deadline) return result
    await sleep(2000)
  }
}

/** @param {string[]} prefix @param {string} apt @param {string[]} args */
function aptGet(prefix, apt, args) {
  const words = [...prefix, '/usr/bin/env', 'DEBIAN_FRONTEND=noninteractive', 'LC_ALL=C', apt, '-q', '-o', `DPkg::Lock::Timeout=${LOCK_WAIT_SECONDS}`, ...args]
  return run(words[0] ?? apt, words.slice(1), { uninterruptible: true })
}
