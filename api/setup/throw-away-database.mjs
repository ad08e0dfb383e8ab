import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { mkdtempSync, rmSync } from 'node:fs'
import os from 'node:os'
import path from 'node:path'
import { databaseUrl, grantAccess, newPassword } from './database-access.mjs'
import { DATABASE_NEEDS, ensurePrograms } from './debian.mjs'
import { startMariadb } from './mariadb.mjs'
import { inRoot } from './paths.mjs'

/** Every database of a test carries this prefix: the account of the tests may touch no other. */
export const TEST_DATABASE_PREFIX = 'hardpan_test_'

/**
 * Starts a database server for one run of tests. A guard process ends it and removes its files when stop is called, and also when
 * this process is gone without calling it.
 * @returns {Promise<{ adminUrl: string, stop: () => Promise<void> }>} adminUrl: may create, use and drop databases named hardpan_test_…
 */
export async function startThrowAwayDatabase() {
  await ensurePrograms(DATABASE_NEEDS)
  const folder = mkdtempSync(path.join(os.tmpdir(), 'hardpan-test-'))
  /** @type {ReturnType<typeof spawnGuard>[]} */
  const guards = []
  const stop = async () => {
    await Promise.all(guards.map((guard) => guard.release()))
    rmSync(folder, { recursive: true, force: true })
  }
  try {
    const instance = await startMariadb(folder, { throwAway: true, onSpawn: (spawned) => guards.push(spawnGuard(spawned)) })
    const password = newPassword()
    await grantAccess(instance, { password, grantOn: `${TEST_DATABASE_PREFIX.replaceAll('_', '\\_')}%` })
    return { adminUrl: databaseUrl(instance, password), stop }
  } catch (error) {
    await stop()
    throw error
  }
}

/** @param {import('./mariadb.mjs').Instance} instance */
function spawnGuard(instance) {
  const guard = spawn(process.execPath, [inRoot('api/setup/guard-database.mjs'), JSON.stringify(instance)], {
    detached: true,
    stdio: ['pipe', 'ignore', 'inherit'],
  })
  const ended = once(guard, 'exit')
  guard.unref()
  return {
    release: async () => {
      guard.ref()
      guard.stdin.end()
      if (guard.exitCode === null) await ended
    },
  }
}
