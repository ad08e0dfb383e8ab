import type { TestProject } from 'vitest/node'
import { openTestObjectStore } from './object-store.ts'
import { dropDatabases, openTestServer, workerDatabaseName } from './test-server.ts'

declare module 'vitest' {
  interface ProvidedContext {
    testDatabaseAdminUrl: string
    /** settings of a server that keeps files, as its environment says them */
    objectStore: Record<string, string>
  }
}

/** Global set-up of the API tests: one database server, on which each worker makes its own database (test-database.ts); one store for files. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const server = await openTestServer()
  await dropDatabases(server.adminUrl, workerDatabaseName(''))
  project.provide('testDatabaseAdminUrl', server.adminUrl)
  const objects = await openTestObjectStore()
  project.provide('objectStore', objects.settings)
  return async () => {
    await objects.stop()
    await server.stop()
  }
}
