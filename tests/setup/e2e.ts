import type { TestProject } from 'vitest/node'
import { ensureClientBuilt } from '#api/setup/client-build.mjs'
import { openTestObjectStore } from './object-store.ts'
import { startServer } from './run-server.ts'
import { createDatabase, dropDatabases, openTestServer, workerDatabaseName } from './test-server.ts'

declare module 'vitest' {
  interface ProvidedContext {
    /** origin of a server with the demo site */
    demoUrl: string
  }
}

/** When the demo's six weeks end, in every run. */
const DEMO_NOW = '2026-12-01T14:32:00-08:00'

/** Global set-up of the browser tests: a built client and one running server with the demo site, for all of them. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  await ensureClientBuilt()
  const server = await openTestServer()
  const name = workerDatabaseName('e2e')
  await dropDatabases(server.adminUrl, name)
  const objects = await openTestObjectStore()
  const demo = await startServer({ databaseUrl: await createDatabase(server.adminUrl, name), env: { ...objects.settings, SEED_DEMO: '1', DEMO_NOW } })
  project.provide('demoUrl', demo.url)
  return async () => {
    await demo.stop()
    await objects.stop()
    await server.stop()
  }
}
