import { TZDate } from '@date-fns/tz'
import { FLAG_COUNT, LOT, type BadGauges } from '#api/features/tests/register-columns.ts'
import { CURRENT, SUPERSEDED } from '#api/features/tests/tests.queries.ts'
import { workDay } from '#shared/domain/lots.ts'
import type { TestFilter } from '#shared/schemas/test-register.ts'

/** The clock that a site's working days are counted on. */
export interface SiteDays {
  readonly timeZone: string
  readonly dayCutHour: number
}

export interface Where {
  readonly text: string
  readonly values: readonly unknown[]
}

const HALF_HOUR = 1_800_000

type Part = readonly [string, ...unknown[]]

/**
 * When a working day of a site begins: the first instant that workDay counts for it. On a day that turns the clocks the hour
 * of the cut may come twice or not at all, so the clock's answer is moved by half hours until it is that instant.
 * @param day YYYY-MM-DD
 * @param plus whole days later
 */
export function startOfDay(day: string, { timeZone, dayCutHour }: SiteDays, plus = 0): Date {
  const [year = 0, month = 1, date = 1] = day.split('-').map(Number)
  const wanted = new Date(Date.UTC(year, month - 1, date + plus)).toISOString().slice(0, 10)
  let start = new TZDate(year, month - 1, date + plus, dayCutHour, 0, timeZone).getTime()
  while (workDay(start - HALF_HOUR, timeZone, dayCutHour) >= wanted) start -= HALF_HOUR
  while (workDay(start, timeZone, dayCutHour) < wanted) start += HALF_HOUR
  return new Date(start)
}

/** The condition of a filter, on `field_test` t. */
export function whereOf(siteId: string, filter: TestFilter, days: SiteDays, badGauges: BadGauges): Where {
  const parts: readonly Part[] = [['t.`site_id` = ?', siteId], ...placeParts(siteId, filter), ...recordParts(siteId, filter, days), ...standingParts(filter, badGauges)]
  return { text: parts.map(([text]) => text).join(' AND '), values: parts.flatMap(([, ...values]) => values) }
}

const equals = (column: string, value: unknown): Part[] => (value === undefined ? [] : [[`t.\`${column}\` = ?`, value]])
const among = (column: string, values: readonly unknown[] | undefined): Part[] => (values === undefined ? [] : [[`t.\`${column}\` IN (?)`, values]])
const holds = (flag: 'true' | 'false' | undefined, condition: string, ...values: unknown[]): Part[] => (flag === undefined ? [] : [[flag === 'true' ? condition : `(${condition} IS NOT TRUE)`, ...values]])

function placeParts(siteId: string, { zoneId, lift, cell, lotId }: TestFilter): Part[] {
  const parts = [...equals('zone_id', zoneId), ...equals('lift', lift), ...equals('cell', cell)]
  // the lot's own lift first: it is in an index, the lot of a test is looked up
  if (lotId !== undefined) parts.push(['t.`lift` = (SELECT l.`lift` FROM `lot` l WHERE l.`site_id` = ? AND l.`id` = ?)', siteId, lotId], [`${LOT} = ?`, lotId])
  return parts
}

function recordParts(siteId: string, filter: TestFilter, days: SiteDays): Part[] {
  const { outcome, purpose, method, moistureMethod, materialId, curveId, technicianId, from, to, search } = filter
  const parts = [...among('outcome', outcome), ...among('purpose', purpose), ...equals('method', method), ...equals('curve_id', curveId), ...equals('recorded_by', technicianId)]
  if (materialId !== undefined) parts.push(['t.`curve_id` IN (SELECT k.`id` FROM `reference_curve` k WHERE k.`site_id` = ? AND k.`material_id` = ?)', siteId, materialId])
  if (from !== undefined) parts.push(['t.`sampled_at` >= ?', startOfDay(from, days)])
  if (to !== undefined) parts.push(['t.`sampled_at` < ?', startOfDay(to, days, 1)])
  if (moistureMethod !== undefined) parts.push(["JSON_VALUE(t.`sheet`, '$.moisture.method') = ?", moistureMethod])
  if (search !== undefined && search.trim() !== '') parts.push(searchPart(siteId, search.trim()))
  return parts
}

function searchPart(siteId: string, text: string): Part {
  const like = `%${text.replace(/[\\%_]/g, '\\$&')}%`
  return [
    '(t.`number` LIKE ? OR t.`headline` LIKE ? OR t.`curve_id` IN (SELECT k.`id` FROM `reference_curve` k WHERE k.`site_id` = ? AND k.`code` LIKE ?) OR t.`recorded_by` IN (SELECT u.`id` FROM `user` u WHERE u.`name` LIKE ?))',
    like,
    like,
    siteId,
    like,
    like,
  ]
}

function standingParts({ current, voided, flagged, near, superseded, retest }: TestFilter, badGauges: BadGauges): Part[] {
  return [
    ...holds(voided, '(t.`voided_at` IS NOT NULL)'),
    ...holds(near, '(t.`near` = 1)'),
    ...holds(retest, "(t.`follow_kind` <=> 'retest')"),
    ...holds(current, CURRENT),
    ...holds(superseded, SUPERSEDED),
    ...holds(flagged, `(${FLAG_COUNT} > 0)`, badGauges),
  ]
}
