import { noteAddress, takeCheckout } from './checkout.mjs'
import { runLifetime } from './lifetime.mjs'
import { runNode } from './node-child.mjs'
import { openObjectStore } from './object-store.mjs'
import { checkNode, ensurePackages } from './packages.mjs'
import { inRoot, ROOT } from './paths.mjs'
import { freePort, holdPort } from './ports.mjs'
import { openDatabase } from './private-database.mjs'
import { say } from './say.mjs'
import { readAddress, readSessionSecret } from './server-settings.mjs'

// The client with hot reload on the port a person opens; the API restarts by itself behind it on a port of its own.
await runLifetime(async (lifetime) => {
  checkNode(process.versions.node)
  const { port, host, url } = readAddress(process.env)
  const secret = readSessionSecret(process.env)
  takeCheckout(lifetime)
  const held = await holdPort(port, host)
  noteAddress(url)
  await ensurePackages()
  lifetime.check()
  const database = await openDatabase(lifetime, process.env)
  lifetime.check()
  const objects = await openObjectStore(lifetime, process.env)
  const apiPort = await freePort()
  const api = runNode([inRoot('api/setup/watch-server.mjs'), 'api/main.ts'], {
    ...process.env,
    ...objects,
    NODE_ENV: 'development',
    DATABASE_URL: database.url,
    SESSION_SECRET: secret,
    PORT: String(apiPort),
    HOST: '127.0.0.1',
    SEED_DEMO: database.isPrivate ? '1' : (process.env.SEED_DEMO ?? ''),
  }, lifetime)
  await held.release()
  const { createServer } = await import('vite')
  const target = `http://127.0.0.1:${apiPort}`
  process.chdir(ROOT)
  const client = await createServer({
    configFile: inRoot('vite.config.ts'),
    server: { port, host, strictPort: true, proxy: { '/api': target, '/socket.io': { target, ws: true } } },
  })
  lifetime.onEnd(() => client.close())
  await client.listen()
  say(`Client with hot reload: ${url}`)
  return (await api) || 1
})
