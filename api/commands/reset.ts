import { createDataSource } from '#api/data-source.ts'

// Empties the private database, so that the next start makes the demo anew. Refuses any other database.

const url = process.env.DATABASE_URL
if (!url || process.env.PRIVATE_DATABASE !== '1') {
  throw new Error('Only the private database of this checkout can be reset; DATABASE_URL names another one. Nothing was changed.')
}

const dataSource = createDataSource(url, { poolSize: 1 })
await dataSource.initialize()
try {
  await dataSource.dropDatabase()
  await dataSource.runMigrations()
  process.stdout.write('The database is empty. npm start makes the demo again.\n')
} finally {
  await dataSource.destroy()
}
