import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { mkdirSync } from 'node:fs'
import path from 'node:path'
import { DATA, inRoot, ROOT } from './paths.mjs'
import { say, SetupError } from './say.mjs'
import { readOrCreateSecret } from './secrets.mjs'

const READY_WITHIN_MS = 30_000
const STOP_WITHIN_MS = 5_000

/** @typedef {{ S3_ENDPOINT: string, S3_BUCKET: string, S3_REGION: string, S3_ACCESS_KEY: string, S3_SECRET_KEY: string, S3_PATH_STYLE: string }} StoreSettings */

/**
 * Where photos and documents are kept: the store S3_ENDPOINT names, or a local stand-in started here and stopped at the end.
 * @param {import('./lifetime.mjs').Lifetime} lifetime
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<Partial<StoreSettings>>} settings for the server, beside its environment
 */
export async function openObjectStore(lifetime, env) {
  if (env.S3_ENDPOINT) return {}
  if (env.DATABASE_URL) say('S3_ENDPOINT is not set: photos and documents are kept in .data/objects of this checkout, beside no other server.')
  const store = await startLocalObjectStore({
    folder: path.join(DATA, 'objects'),
    accessKey: readOrCreateSecret(path.join(DATA, 'objects-access-key')),
    secretKey: readOrCreateSecret(path.join(DATA, 'objects-secret-key')),
  })
  lifetime.onEnd(store.stop)
  return store.settings
}

/**
 * Starts the stand-in on a free port of loopback. It ends when stopped, and with the process that started it.
 * @param {{ folder: string, accessKey: string, secretKey: string }} options folder: made when it is missing, for this user only
 * @returns {Promise<{ settings: StoreSettings, stop: () => Promise<void> }>}
 */
export async function startLocalObjectStore({ folder, accessKey, secretKey }) {
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  const account = { S3_BUCKET: 'hardpan', S3_ACCESS_KEY: accessKey, S3_SECRET_KEY: secretKey }
  // Its packages use calls of Node that are going out of use; nothing a person here could do about it.
  const child = spawn(process.execPath, ['--no-deprecation', '--import', inRoot('api/setup/follow-parent.mjs'), inRoot('api/setup/local-object-store.mjs')], {
    cwd: ROOT,
    env: { PATH: process.env.PATH, OBJECTS_FOLDER: folder, ...account },
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    detached: true,
  })
  const ended = once(child, 'exit')
  const stop = async () => {
    if (child.exitCode !== null || child.signalCode !== null) return
    const patience = setTimeout(() => child.kill('SIGKILL'), STOP_WITHIN_MS)
    child.kill('SIGTERM')
    await ended
    clearTimeout(patience)
  }
  const port = await portOf(child)
  if (port === null) {
    await stop()
    throw new SetupError(`The store for photos and documents could not be started on ${folder}. Set S3_ENDPOINT to use another.`)
  }
  child.unref()
  child.channel?.unref()
  return { settings: { S3_ENDPOINT: `http://127.0.0.1:${port}`, S3_REGION: 'us-east-1', S3_PATH_STYLE: '1', ...account }, stop }
}

/** The port a started child says it has; null when it ends or says nothing. @param {import('node:child_process').ChildProcess} child @returns {Promise<number | null>} */
function portOf(child) {
  return new Promise((resolve) => {
    const patience = setTimeout(() => resolve(null), READY_WITHIN_MS)
    const settle = (/** @type {number | null} */ port) => {
      clearTimeout(patience)
      resolve(port)
    }
    child.once('message', (address) => settle(/** @type {import('node:net').AddressInfo} */ (address).port))
    child.once('exit', () => settle(null))
    child.once('error', () => settle(null))
  })
}
