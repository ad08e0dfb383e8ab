import path from 'node:path'
import { DATA } from './paths.mjs'
import { readPort } from './ports.mjs'
import { SetupError } from './say.mjs'
import { readOrCreateSecret } from './secrets.mjs'

/** @param {NodeJS.ProcessEnv} env @returns {{ port: number, host: string, url: string }} */
export function readAddress(env) {
  const port = readPort(env.PORT, 4600)
  const host = env.HOST || '127.0.0.1'
  const shown = host === '0.0.0.0' || host === '::' ? 'localhost' : host.includes(':') ? `[${host}]` : host
  return { port, host, url: `http://${shown}:${port}` }
}

/**
 * Signs the sessions. Generated for the private database; a shared database or several nodes must agree on one, so there it is given.
 * @param {NodeJS.ProcessEnv} env
 * @param {string} [file]
 */
export function readSessionSecret(env, file = path.join(DATA, 'session-secret')) {
  if (env.SESSION_SECRET) return env.SESSION_SECRET
  const shared = env.DATABASE_URL ? 'DATABASE_URL' : env.REDIS_URL ? 'REDIS_URL' : null
  if (shared !== null) throw new SetupError(`${shared} is set, so SESSION_SECRET must be set too: a long random text, the same for every server.`)
  return readOrCreateSecret(file)
}
