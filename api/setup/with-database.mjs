import { takeCheckout } from './checkout.mjs'
import { runLifetime } from './lifetime.mjs'
import { lockHolder } from './lock.mjs'
import { runNode } from './node-child.mjs'
import { openObjectStore } from './object-store.mjs'
import { checkNode, ensurePackages } from './packages.mjs'
import { START_LOCK } from './paths.mjs'
import { openDatabase, runningDatabaseUrl } from './private-database.mjs'
import { SetupError } from './say.mjs'

// node api/setup/with-database.mjs api/commands/<name>.ts [arguments]: runs it on DATABASE_URL, on the database of a running
// npm start, or on the private database started for it; files as npm start keeps them.
await runLifetime(async (lifetime) => {
  checkNode(process.versions.node)
  const args = process.argv.slice(2)
  if (args.length === 0) throw new SetupError('Say which file to run: node api/setup/with-database.mjs api/commands/<name>.ts')
  await ensurePackages()
  const database = await findDatabase(lifetime)
  return runNode(args, { ...process.env, ...database, ...(await openObjectStore(lifetime, process.env)) }, lifetime)
})

/** @param {import('./lifetime.mjs').Lifetime} lifetime */
async function findDatabase(lifetime) {
  if (!process.env.DATABASE_URL && lockHolder(START_LOCK) !== null) {
    const url = runningDatabaseUrl()
    if (url !== null) return { DATABASE_URL: url, PRIVATE_DATABASE: '1' }
  }
  if (!process.env.DATABASE_URL) takeCheckout(lifetime)
  const { url, isPrivate } = await openDatabase(lifetime, process.env)
  return { DATABASE_URL: url, PRIVATE_DATABASE: isPrivate ? '1' : '' }
}
