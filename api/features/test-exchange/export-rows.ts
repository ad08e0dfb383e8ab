import type { EntityManager } from 'typeorm'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import type { ExchangeReferences } from '#api/features/test-exchange/exchange-references.ts'
import { exchangeSite } from '#api/features/test-exchange/known-tests.ts'
import { loadStoredTests, type StoredTest } from '#api/features/test-exchange/stored-tests.ts'
import { writeSiteTime } from '#shared/exchange/site-time.ts'
import type { RowValues } from '#shared/exchange/test-columns.ts'
import { SITE_UNITS, writeRow } from '#shared/exchange/write-row.ts'
import type { ExportUnits } from '#shared/schemas/test-exchange.ts'
import { convertDensity } from '#shared/units/density.ts'

/** Tests read and written at a time, so that a long register never stands in memory whole. */
const AT_ONCE = 500

export interface ExportSource {
  readonly manager: EntityManager
  readonly plan: SitePlan
  readonly references: ExchangeReferences
  readonly ids: readonly string[]
  readonly units: ExportUnits
}

/** The rows of a file of tests, in the order of their ids. */
export async function* exportRows(source: ExportSource): AsyncGenerator<RowValues> {
  const { manager, plan, references, ids, units } = source
  const names = await loadNames(source)
  for (let from = 0; from < ids.length; from += AT_ONCE) {
    for (const stored of await loadStoredTests(manager, plan.site.id, ids.slice(from, from + AT_ONCE), references)) {
      yield { ...writeRow(stored.test, exchangeSite(plan), units), ...readingValues(stored, plan, names) }
    }
  }
}

interface Names {
  readonly people: ReadonlyMap<string, string>
  readonly numbers: ReadonlyMap<string, string>
  readonly materials: ReadonlyMap<string, string>
}

async function loadNames({ manager, plan: { site }, references }: ExportSource): Promise<Names> {
  const people: { id: string; name: string }[] = await manager.query('SELECT u.`id`, u.`name` FROM `user` u WHERE u.`id` IN (SELECT t.`recorded_by` FROM `field_test` t WHERE t.`site_id` = ?)', [site.id])
  const followed: { id: string; number: string }[] = await manager.query('SELECT `id`, `number` FROM `field_test` WHERE `site_id` = ? AND `id` IN (SELECT f.`follows_id` FROM `field_test` f WHERE f.`site_id` = ?)', [site.id, site.id])
  const materials: { id: string; name: string }[] = await manager.query('SELECT `id`, `name` FROM `borrow_material` WHERE `site_id` = ?', [site.id])
  const named = new Map(materials.map(({ id, name }) => [id, name]))
  return {
    people: new Map(people.map(({ id, name }) => [id, name])),
    numbers: new Map(followed.map(({ id, number }) => [id, number])),
    materials: new Map(references.curves.map(({ id, materialId }) => [id, named.get(materialId) ?? ''])),
  }
}

/** What stands beside for the reader: worked out here, or this site's own names. */
function readingValues({ entity }: StoredTest, plan: SitePlan, { people, numbers, materials }: Names): RowValues {
  const { site } = plan
  const density = (kgPerM3: number): number => convertDensity(kgPerM3, 'kg/m3', SITE_UNITS[site.unitSystem].density)
  const { verdict, voidedAt } = entity
  return {
    number: entity.number,
    ...(entity.followsId === null ? {} : { follows: numbers.get(entity.followsId) ?? '' }),
    zone: plan.zones.find((zone) => zone.id === entity.zoneId)?.name ?? '',
    cell: plan.label(entity.cell),
    technician: people.get(entity.recordedBy) ?? '',
    recordedAt: writeSiteTime(entity.recordedAt.toISOString(), site.timeZone),
    material: materials.get(entity.curveId) ?? '',
    outcome: entity.outcome,
    headline: entity.headline,
    rc: entity.rc,
    resultWet: density(entity.wetDensity),
    resultDry: density(entity.dryDensity),
    resultMoisture: entity.moisture,
    moistureDeviation: entity.moistureDeviation,
    maxDryDensity: density(verdict.maxDryDensityUsed),
    optimum: verdict.optimumUsed,
    ...(verdict.saturation === null ? {} : { saturation: verdict.saturation }),
    airVoids: verdict.airVoids,
    flags: entity.flags.map((flag) => flag.message).join(' '),
    ...(voidedAt === null ? {} : { voidedAt: writeSiteTime(voidedAt.toISOString(), site.timeZone), voidReason: entity.voidReason ?? '' }),
  }
}
