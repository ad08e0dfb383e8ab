import { createDataSource } from '#api/data-source.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { verifyChain } from '#api/features/events/verify-chain.ts'
import type { ChainFault } from '#api/features/events/verify-chain.ts'

// Computes every hash of every site's audit trail again. Ends with code 1 when one is not sound.

const FAULTS: Readonly<Record<ChainFault, string>> = {
  missing: 'is missing',
  'not-linked': 'does not follow from the one before it',
  changed: 'does not say what was recorded',
  'head-differs': 'is not the end that the site’s head names',
}

const url = process.env.DATABASE_URL
if (!url) throw new Error('Set DATABASE_URL to the database whose audit trail is to be verified')

const dataSource = createDataSource(url, { poolSize: 2 })
await dataSource.initialize()
try {
  const sites = await dataSource.manager.find(SiteEntity, { select: { id: true, name: true }, order: { name: 'ASC' } })
  for (const { id, name } of sites) {
    const verdict = await verifyChain(dataSource.manager, id)
    if (verdict.ok) process.stdout.write(`${name}: ${verdict.length} events, sound, ends in ${verdict.head.slice(0, 12)}\n`)
    else {
      process.exitCode = 1
      process.stdout.write(`${name}: event ${verdict.seq} ${FAULTS[verdict.reason]}\n`)
    }
  }
} finally {
  await dataSource.destroy()
}
