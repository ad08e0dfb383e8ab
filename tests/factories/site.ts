import { randomUUID } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { emptyHead } from '#api/features/site-head/new-site.ts'
import { buildUser } from '#tests/factories/user.ts'

/** A site at revision 0 with a 10 by 10 grid of 10 m cells, and nobody in it. */
export async function buildSite(manager: EntityManager, overrides: Partial<SiteEntity> = {}): Promise<SiteEntity> {
  const now = new Date()
  const site: SiteEntity = {
    id: randomUUID(),
    name: 'Alder bench',
    subtitle: '',
    crsCode: 'EPSG:32613',
    unitSystem: 'si',
    timeZone: 'America/Denver',
    dayCutHour: 0,
    grid: { origin: { easting: 500_000, northing: 4_400_100 }, cellSize: 10, columns: 10, rows: 10, rotationDeg: 0, unit: 'm' },
    boundary: [
      { easting: 500_000, northing: 4_400_000 },
      { easting: 500_100, northing: 4_400_000 },
      { easting: 500_100, northing: 4_400_100 },
      { easting: 500_000, northing: 4_400_100 },
    ],
    rounding: { method: 'rounding', ties: 'even' },
    waterDensity: 1000,
    combinedFactor: 1,
    verticalDatum: 'local',
    createdBy: overrides.createdBy ?? (await buildUser(manager)).id,
    createdAt: now,
    updatedAt: now,
    ...overrides,
  }
  await manager.insert(SiteEntity, site)
  await manager.insert(SiteHeadEntity, emptyHead(site.id))
  return site
}
