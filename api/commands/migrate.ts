import { createDataSource } from '#api/data-source.ts'

const url = process.env.DATABASE_URL
if (!url) throw new Error('Set DATABASE_URL to the database that is to be migrated')

const dataSource = createDataSource(url, { poolSize: 1 })
await dataSource.initialize()
try {
  const done = await dataSource.runMigrations()
  process.stdout.write(done.length === 0 ? 'The schema is up to date.\n' : `${done.map(({ name }) => name).join('\n')}\n`)
} finally {
  await dataSource.destroy()
}
