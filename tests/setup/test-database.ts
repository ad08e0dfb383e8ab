import { inject } from 'vitest'
import { createDatabase, workerDatabaseName } from './test-server.ts'

let created: Promise<string> | undefined

/** Address of the database of this vitest worker, made empty on first use in the run. Several test files in turn share it. */
export function testDatabaseUrl(): Promise<string> {
  created ??= createDatabase(inject('testDatabaseAdminUrl'), workerDatabaseName(process.env.VITEST_POOL_ID ?? '1'))
  return created
}
