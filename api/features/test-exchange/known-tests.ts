import type { EntityManager } from 'typeorm'
import type { ExchangeReferences } from '#api/features/test-exchange/exchange-references.ts'
import { loadStoredTests } from '#api/features/test-exchange/stored-tests.ts'
import { pointOf } from '#api/features/test-exchange/resolve-row.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { differingColumns } from '#shared/exchange/same-test.ts'
import type { ColumnKey } from '#shared/exchange/test-columns.ts'
import type { ExchangeSite } from '#shared/exchange/write-row.ts'
import type { ImportRow } from '#shared/schemas/test-exchange.ts'

/** As near as two readings of one place are. */
const SAME_PLACE_MM = 10

export interface KnownTests {
  /** of the row's own record on this site: its number, and the columns in which the row is another; undefined where it is new */
  recorded(row: ImportRow): { readonly number: string; readonly differs: readonly ColumnKey[] } | undefined
  /** number of a test at the same place, lift and time that the row may be, by another record; undefined for none */
  twin(row: ImportRow): string | undefined
  idOfNumber(number: string): string | undefined
}

export function exchangeSite({ site }: SitePlan): ExchangeSite {
  return { timeZone: site.timeZone, system: site.unitSystem, planUnit: site.grid.unit }
}

/** What of a batch stands on the site already, so that nothing is ever recorded twice. */
export async function loadKnownTests(manager: EntityManager, plan: SitePlan, rows: readonly ImportRow[], references: ExchangeReferences): Promise<KnownTests> {
  const siteId = plan.site.id
  const stored = new Map((await loadStoredTests(manager, siteId, rows.map(({ test }) => test.id), references)).map((each) => [each.test.id, each]))
  const times = [...new Set(rows.filter((row) => !row.identified).map(({ test }) => new Date(test.sampledAt).getTime()))]
  const near: { id: string; number: string; lift: number; u: string; v: string; easting: number; northing: number; sampled_at: Date }[] =
    times.length === 0 ? [] : await manager.query('SELECT `id`, `number`, `lift`, `easting`, `northing`, `sampled_at` FROM `field_test` WHERE `site_id` = ? AND `voided_at` IS NULL AND `sampled_at` IN (?)', [siteId, times.map((time) => new Date(time))])
  const numbers = [...new Set(rows.flatMap(({ test }) => (test.follows?.record === null ? (test.follows.number ?? []) : [])))]
  const numbered: { id: string; number: string }[] = numbers.length === 0 ? [] : await manager.query('SELECT `id`, `number` FROM `field_test` WHERE `site_id` = ? AND `number` IN (?)', [siteId, numbers])
  const within = SAME_PLACE_MM / 1000 / metres(plan)
  return {
    recorded({ test }) {
      const known = stored.get(test.id)
      if (!known) return undefined
      const point = pointOf(plan, test.place)
      const number = test.follows?.number ?? null
      const follows = test.follows && test.follows.record === null ? { ...test.follows, record: numbered.find((each) => each.number === number)?.id ?? null } : test.follows
      return { number: known.entity.number, differs: differingColumns({ ...test, place: point ?? test.place, follows }, known.test, exchangeSite(plan)) }
    },
    twin({ test, identified, another }) {
      const point = identified || another ? undefined : pointOf(plan, test.place)
      if (!point) return undefined
      const time = Date.parse(test.sampledAt)
      return near.find((other) => other.id !== test.id && other.lift === test.lift && other.sampled_at.getTime() === time && Math.hypot(other.easting - point.easting, other.northing - point.northing) <= within)?.number
    },
    idOfNumber: (number) => numbered.find((each) => each.number.toLowerCase() === number.toLowerCase())?.id,
  }
}

/** Metres in the site's unit. */
function metres({ site }: SitePlan): number {
  return { m: 1, ft: 0.3048, 'us-ft': 1200 / 3937 }[site.grid.unit]
}
