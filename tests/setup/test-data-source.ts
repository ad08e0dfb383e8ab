import type { DataSource } from 'typeorm'
import { createDataSource } from '#api/data-source.ts'
import { testDatabaseUrl } from './test-database.ts'

let opened: Promise<DataSource> | undefined

async function open(): Promise<DataSource> {
  const dataSource = createDataSource(await testDatabaseUrl())
  await dataSource.initialize()
  await dataSource.runMigrations()
  return dataSource
}

/** The migrated database of this vitest worker, opened once for a test file. */
export function testDataSource(): Promise<DataSource> {
  opened ??= open()
  return opened
}

/** For afterAll: gives the connections back. */
export async function closeTestDataSource(): Promise<void> {
  const dataSource = await opened
  opened = undefined
  await dataSource?.destroy()
}
