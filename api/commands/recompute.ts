import { createDataSource } from '#api/data-source.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { findDifferences } from '#api/features/ground/recompute.queries.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'

// Derives every site again from its facts and compares what is stored. Changes nothing; ends with code 1 when one differs.

const SHOWN = 20

const url = process.env.DATABASE_URL
if (!url) throw new Error('Set DATABASE_URL to the database that is to be derived again')

const dataSource = createDataSource(url, { poolSize: 2 })
await dataSource.initialize()
try {
  const sites = await dataSource.manager.find(SiteEntity, { select: { id: true, name: true }, order: { name: 'ASC' } })
  for (const { id, name } of sites) {
    const differences = await dataSource.transaction('REPEATABLE READ', async (manager) => findDifferences(manager, await loadSitePlan(manager, id)))
    process.stdout.write(differences.length === 0 ? `${name}: stored state equals its facts\n` : `${name}: ${differences.length} differences\n`)
    for (const difference of differences.slice(0, SHOWN)) process.stdout.write(`  ${difference}\n`)
    if (differences.length > 0) process.exitCode = 1
  }
} finally {
  await dataSource.destroy()
}
