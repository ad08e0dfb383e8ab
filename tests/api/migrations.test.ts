import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { DataSource } from 'typeorm'
import { createDataSource } from '#api/data-source.ts'
import { migrations } from '#api/migrations/index.ts'
import { createDatabase, dropDatabases, workerDatabaseName } from '#tests/setup/test-server.ts'

const NAME = workerDatabaseName(`migrations_${process.pid}`)
let dataSource: DataSource

async function tables(): Promise<string[]> {
  const rows: { name: string }[] = await dataSource.query(
    'SELECT table_name AS name FROM information_schema.tables WHERE table_schema = DATABASE() ORDER BY table_name',
  )
  return rows.map((row) => row.name)
}

beforeAll(async () => {
  dataSource = createDataSource(await createDatabase(inject('testDatabaseAdminUrl'), NAME))
  await dataSource.initialize()
})

afterAll(async () => {
  await dataSource.destroy()
  await dropDatabases(inject('testDatabaseAdminUrl'), NAME)
})

describe('migrations', () => {
  it('build from empty exactly the schema the entities declare', async () => {
    await dataSource.runMigrations()
    const drift = await dataSource.driver.createSchemaBuilder().log()
    expect(drift.upQueries.map((query) => query.query)).toEqual([])
  })

  it('go down to nothing and up again to the same tables', async () => {
    const before = await tables()
    for (let left = migrations.length; left > 0; left--) await dataSource.undoLastMigration()
    expect(await tables()).toEqual(['migration'])
    await dataSource.runMigrations()
    expect(await tables()).toEqual(before)
  })

  it('have nothing to do the second time', async () => {
    expect(await dataSource.runMigrations()).toEqual([])
  })
})
