import type { TestProject } from 'vitest/node'
import { dropDatabases, openTestServer, workerDatabaseName } from './test-server.ts'

declare module 'vitest' {
  interface ProvidedContext {
    testDatabaseAdminUrl: string
  }
}

/** Global set-up of the API tests: one database server, on which each worker makes its own database (test-database.ts). */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const server = await openTestServer()
  await dropDatabases(server.adminUrl, workerDatabaseName(''))
  project.provide('testDatabaseAdminUrl', server.adminUrl)
  return server.stop
}
