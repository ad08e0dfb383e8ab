import type { TestProject } from 'vitest/node'
import { ensureClientBuilt } from '#api/setup/client-build.mjs'
import { createDatabase, dropDatabases, openTestServer, workerDatabaseName } from './test-server.ts'

declare module 'vitest' {
  interface ProvidedContext {
    e2eDatabaseUrl: string
  }
}

/** Global set-up of the browser tests: a built client and an empty database for the server that run-server.ts starts. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  await ensureClientBuilt()
  const server = await openTestServer()
  const name = workerDatabaseName('e2e')
  await dropDatabases(server.adminUrl, name)
  project.provide('e2eDatabaseUrl', await createDatabase(server.adminUrl, name))
  return server.stop
}
