import { existsSync } from 'node:fs'
import { noteAddress, takeCheckout } from './checkout.mjs'
import { ensureClientBuilt } from './client-build.mjs'
import { runLifetime } from './lifetime.mjs'
import { runNode } from './node-child.mjs'
import { openObjectStore } from './object-store.mjs'
import { checkNode, ensurePackages } from './packages.mjs'
import { inRoot } from './paths.mjs'
import { holdPort } from './ports.mjs'
import { openDatabase } from './private-database.mjs'
import { say, SetupError } from './say.mjs'
import { readAddress, readSessionSecret } from './server-settings.mjs'

const SERVER = 'api/main.ts'

await runLifetime(async (lifetime) => {
  checkNode(process.versions.node)
  const { port, host, url } = readAddress(process.env)
  const secret = readSessionSecret(process.env)
  takeCheckout(lifetime)
  const held = await holdPort(port, host)
  noteAddress(url)
  lifetime.check()
  await ensurePackages()
  lifetime.check()
  await ensureClientBuilt()
  lifetime.check()
  const database = await openDatabase(lifetime, process.env)
  lifetime.check()
  const objects = await openObjectStore(lifetime, process.env)
  lifetime.check()
  if (!existsSync(inRoot(SERVER))) throw new SetupError(`${SERVER} is missing: this checkout is not whole.`)
  say('Starting the server.')
  await held.release()
  const code = await runNode([SERVER], {
    ...process.env,
    ...objects,
    NODE_ENV: 'production',
    DATABASE_URL: database.url,
    SESSION_SECRET: secret,
    PORT: String(port),
    HOST: host,
    SEED_DEMO: database.isPrivate ? '1' : (process.env.SEED_DEMO ?? ''),
  }, lifetime)
  if (!lifetime.ending) say(`The server ended with code ${code}.${database.isPrivate ? ' Stopping the database.' : ''}`)
  // A server that ends unasked has failed, whatever it says.
  return code || 1
})
