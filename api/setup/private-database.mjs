import path from 'node:path'
import { databaseUrl, grantAccess } from './database-access.mjs'
import { DATABASE_NEEDS, ensurePrograms } from './debian.mjs'
import { findRunning, startMariadb, stopMariadb } from './mariadb.mjs'
import { DATA } from './paths.mjs'
import { say } from './say.mjs'
import { readOrCreateSecret } from './secrets.mjs'

const DATABASE = 'hardpan'
const PASSWORD_FILE = path.join(DATA, 'database-password')

/**
 * The database to work on: the one DATABASE_URL names, or this checkout's private one, started here and stopped at the end.
 * @param {import('./lifetime.mjs').Lifetime} lifetime
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<{ url: string, isPrivate: boolean }>}
 */
export async function openDatabase(lifetime, env) {
  if (env.DATABASE_URL) return { url: env.DATABASE_URL, isPrivate: false }
  await ensurePrograms(DATABASE_NEEDS)
  lifetime.check()
  say('Starting the database.')
  const instance = await startMariadb(DATA, { onSpawn: (spawned) => lifetime.onEnd(() => stopMariadb(spawned)) })
  const password = readOrCreateSecret(PASSWORD_FILE)
  await grantAccess(instance, { password, database: DATABASE, grantOn: DATABASE })
  return { url: databaseUrl(instance, password, DATABASE), isPrivate: true }
}

/** Address of the private database a running npm start of this checkout serves, null when none does. @returns {string | null} */
export function runningDatabaseUrl() {
  const instance = findRunning(DATA)
  return instance === null ? null : databaseUrl(instance, readOrCreateSecret(PASSWORD_FILE), DATABASE)
}
