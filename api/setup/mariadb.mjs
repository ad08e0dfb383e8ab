import { spawn } from 'node:child_process'
import { closeSync, existsSync, mkdirSync, mkdtempSync, openSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs'
import os from 'node:os'
import path from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { findProgram, lastLines, run, runOrFail } from './commands.mjs'
import { freePort } from './ports.mjs'
import { commandLine, isAlive, signalProcess, stopProcess } from './processes.mjs'
import { say, SetupError } from './say.mjs'

/**
 * A running private MariaDB server.
 * @typedef {object} Instance
 * @property {number} pid
 * @property {number} port on 127.0.0.1
 * @property {string} socket the only way in for its administrator
 * @property {string} runFolder holds the socket; readable by this user only
 * @property {string} folder holds the data directory, the record and the log
 */

/** @typedef {{ port: number, socket: string, runFolder: string }} Place */

const RUN_FOLDER_PREFIX = 'hardpan-db-'
const READY_WITHIN_MS = 60_000
const STOP_WITHIN_MS = 30_000
// Debian's default of 96 MB of redo log is far more than a private instance needs on a laptop's disk.
const LOG_SIZE = '--innodb-log-file-size=16M'

/** @param {string} folder */
export const filesOf = (folder) => ({
  data: path.join(folder, 'mariadb'),
  unfinished: path.join(folder, 'mariadb.new'),
  log: path.join(folder, 'mariadb.log'),
  pid: path.join(folder, 'mariadb.pid'),
  record: path.join(folder, 'mariadb.json'),
})

/**
 * Starts the private server of a folder, or adopts the one an ended command left running.
 * @param {string} folder
 * @param {{ throwAway?: boolean, onSpawn?: (instance: Instance) => void }} [options] throwAway: speed before durability
 * @returns {Promise<Instance>}
 */
export async function startMariadb(folder, { throwAway = false, onSpawn = () => undefined } = {}) {
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  const files = filesOf(folder)
  checkDataDirectory(files.data)
  const orphan = await adoptOrphan(folder)
  if (orphan !== null) {
    onSpawn(orphan)
    say(`Using the database an earlier run left running (process ${orphan.pid}).`)
    return orphan
  }
  removeLeftovers(files)
  if (!existsSync(files.data)) await createDataDirectory(files)
  for (let attempt = 1; ; attempt += 1) {
    const instance = await launch(folder, throwAway, onSpawn)
    if (instance !== null) return instance
    if (attempt === 3) throw new SetupError('MariaDB found no free port on 127.0.0.1.')
  }
}

/** Ends the server cleanly and removes its socket. @param {Instance} instance */
export async function stopMariadb(instance) {
  await stopProcess(instance.pid, STOP_WITHIN_MS)
  rmSync(instance.runFolder, { recursive: true, force: true })
  rmSync(filesOf(instance.folder).record, { force: true })
  rmSync(filesOf(instance.folder).pid, { force: true })
}

/** The server of a folder when it is running, by its record and pid file. @param {string} folder @returns {Instance | null} */
export function findRunning(folder) {
  const files = filesOf(folder)
  try {
    const pid = Number(readFileSync(files.pid, 'utf8').trim())
    const place = /** @type {Place} */ (JSON.parse(readFileSync(files.record, 'utf8')))
    if (!Number.isInteger(pid) || pid <= 0 || !isAlive(pid)) return null
    const words = commandLine(pid)
    // The number may belong to another program since; where /proc tells, the data directory must be ours.
    if (words.length > 0 && !words.includes(`--datadir=${files.data}`)) return null
    return { pid, folder, ...place }
  } catch {
    return null
  }
}

/** @param {Place} place */
async function answers({ socket }) {
  return (await run(program('mariadb-admin'), ['--no-defaults', `--socket=${socket}`, `--user=${userName()}`, '--connect-timeout=5', 'ping'])).code === 0
}

/** @param {string} folder */
async function adoptOrphan(folder) {
  const orphan = findRunning(folder)
  if (orphan === null) return null
  if (await answers(orphan)) return orphan
  say(`Stopping the database an earlier run left (process ${orphan.pid}), which does not answer.`)
  await stopMariadb(orphan)
  return null
}

/** The socket's folder of a server that was ended without a word. @param {ReturnType<typeof filesOf>} files */
function removeLeftovers(files) {
  try {
    const { runFolder } = /** @type {Place} */ (JSON.parse(readFileSync(files.record, 'utf8')))
    if (path.basename(runFolder).startsWith(RUN_FOLDER_PREFIX)) rmSync(runFolder, { recursive: true, force: true })
  } catch {
    // No record, or none that can be read: nothing is known to be left over.
  }
  rmSync(files.record, { force: true })
  rmSync(files.pid, { force: true })
}

/** What can be told before the server tries, which would leave files in a folder that is no database. @param {string} data */
function checkDataDirectory(data) {
  if (!existsSync(data)) return
  if (!existsSync(path.join(data, 'mysql'))) throw new SetupError(`${data} is not a whole database: its own tables are missing.\n${moveAway(data)}`)
  const uid = process.getuid?.()
  if (uid === undefined) return
  const owner = statSync(data).uid
  if (owner === uid) return
  throw new SetupError(`${data} belongs to user number ${owner}, and this is user number ${uid}. Start Hardpan as that user.`)
}

/** Made beside its place and moved there when whole, so that an interrupted start leaves no half-made database. @param {ReturnType<typeof filesOf>} files */
async function createDataDirectory(files) {
  rmSync(files.unfinished, { recursive: true, force: true })
  const user = userName()
  const args = ['--no-defaults', `--datadir=${files.unfinished}`, '--skip-test-db', '--skip-name-resolve', LOG_SIZE]
  args.push('--auth-root-authentication-method=socket', `--auth-root-socket-user=${user}`)
  if (user === 'root') args.push('--user=root')
  await runOrFail(program('mariadb-install-db'), args, { failure: 'MariaDB could not create its data directory:' })
  renameSync(files.unfinished, files.data)
}

/**
 * @param {string} folder
 * @param {boolean} throwAway
 * @param {(instance: Instance) => void} onSpawn
 * @returns {Promise<Instance | null>} null when another program took the port meanwhile
 */
async function launch(folder, throwAway, onSpawn) {
  const files = filesOf(folder)
  const place = await makePlace()
  writeFileSync(files.record, JSON.stringify(place), { mode: 0o600 })
  const log = openSync(files.log, 'w', 0o600)
  // Detached: Ctrl-C in the terminal must not reach the database before the server has ended.
  const child = spawn(program('mariadbd'), serverArguments(files, place, throwAway), { detached: true, stdio: ['ignore', log, log] })
  closeSync(log)
  const ended = new Promise((/** @type {(value: true) => void} */ resolve) => {
    child.on('exit', () => resolve(true))
    child.on('error', () => resolve(true))
  })
  if (child.pid === undefined) throw new SetupError('MariaDB could not be started.')
  child.unref()
  const instance = { pid: child.pid, folder, ...place }
  onSpawn(instance)
  if (await becomesReady(instance, ended)) return instance
  signalProcess(instance.pid, 'SIGKILL')
  await stopMariadb(instance)
  const text = readFileSync(files.log, 'utf8')
  if (/Bind on TCP\/IP port|port: \d+ already in use/i.test(text)) return null
  throw new SetupError(cannotOpenMessage(folder, text))
}

/** @returns {Promise<Place>} */
async function makePlace() {
  // The path of a Unix socket may have 107 bytes at most.
  const base = os.tmpdir().length > 60 ? '/tmp' : os.tmpdir()
  const runFolder = mkdtempSync(path.join(base, RUN_FOLDER_PREFIX))
  mkdirSync(path.join(runFolder, 'files'), { mode: 0o700 })
  return { port: await freePort(), socket: path.join(runFolder, 'socket'), runFolder }
}

/** @param {ReturnType<typeof filesOf>} files @param {Place} place @param {boolean} throwAway */
function serverArguments(files, place, throwAway) {
  const args = [
    '--no-defaults',
    `--datadir=${files.data}`,
    `--pid-file=${files.pid}`,
    `--socket=${place.socket}`,
    `--port=${place.port}`,
    '--bind-address=127.0.0.1',
    '--skip-name-resolve',
    `--secure-file-priv=${path.join(place.runFolder, 'files')}`,
    '--local-infile=0',
    '--character-set-server=utf8mb4',
    '--collation-server=utf8mb4_unicode_ci',
    '--default-time-zone=+00:00',
    '--max-allowed-packet=64M',
    LOG_SIZE,
  ]
  if (process.getuid?.() === 0) args.push('--user=root')
  if (throwAway) args.push('--innodb-flush-log-at-trx-commit=0', '--innodb-doublewrite=0')
  return args
}

/** @param {Instance} instance @param {Promise<true>} ended */
async function becomesReady(instance, ended) {
  const deadline = Date.now() + READY_WITHIN_MS
  while (Date.now() < deadline) {
    if (existsSync(instance.socket) && (await answers(instance))) return true
    if (await Promise.race([ended, sleep(50)])) return false
  }
  return false
}

/** @param {string} folder @param {string} log @returns {string} */
export function cannotOpenMessage(folder, log) {
  const { data, log: file } = filesOf(folder)
  const errors = log.split('\n').filter((line) => line.includes('[ERROR]')).map((line) => line.replace(/^.*\[ERROR\]\s*/, '  '))
  const reason = lastLines(errors.length > 0 ? errors.slice(0, 5).join('\n') : log, 5)
  const inUse = /Unable to lock|Can't lock aria control file|errno: 11/i.test(log)
  const remedy = inUse
    ? 'Another MariaDB server has it open: stop that one, then start again.'
    : `Nothing was removed from it. ${moveAway(data)}`
  return `The database in ${data} cannot be opened:\n${reason}\nThe whole log is ${file}.\n${remedy}`
}

/** The database's root goes by the name of the user who runs it, and is let in by the socket only as that user. @returns {string} */
export function userName() {
  try {
    return os.userInfo().username
  } catch {
    throw new SetupError(`User number ${process.getuid?.()} has no name on this machine, which the database needs.`)
  }
}

/** @param {string} data */
const moveAway = (data) => `To begin with a fresh demo, move it away: mv ${data} ${data}.broken`

/** @param {string} name */
function program(name) {
  const found = findProgram(name)
  if (found === null) throw new SetupError(`Missing on this machine: ${name}.`)
  return found
}
