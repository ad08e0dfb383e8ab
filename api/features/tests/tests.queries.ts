import type { EntityManager } from 'typeorm'
import { loadGaugeChecks, USES_GAUGE } from '#api/features/gauges/gauge-checks.queries.ts'
import type { TestQuery, TestSummary } from '#shared/schemas/field-test.ts'
import type { TestGauge } from '#shared/schemas/gauge.ts'

interface SummaryRow {
  readonly id: string
  readonly number: string
  readonly seq: number
  readonly purpose: TestSummary['purpose']
  readonly method: TestSummary['method']
  readonly zone_id: string
  readonly lift: number
  readonly cell: number
  readonly lot_id: string | null
  readonly easting: number
  readonly northing: number
  readonly sampled_at: Date
  readonly recorded_by: string
  readonly recorder: string
  readonly curve_id: string
  readonly curve_code: string
  readonly outcome: TestSummary['outcome']
  readonly treated_as_fail: number
  readonly near: number
  readonly headline: string
  readonly rc: number
  readonly moisture: number
  readonly moisture_deviation: number
  readonly dry_density: number
  readonly current: number
  readonly superseded: number
  readonly voided_at: Date | null
  readonly flag_count: number
  readonly uses_gauge: number
  readonly gauge_id: string | null
}

/** The last of a chain that is not void, as the ground reads it (lot-tests.queries.ts). */
export const CURRENT =
  '(t.`id` = (SELECT n.`id` FROM `field_test` n WHERE n.`site_id` = t.`site_id` AND n.`chain_id` = t.`chain_id` AND n.`voided_at` IS NULL ORDER BY n.`sampled_at` DESC, n.`seq` DESC LIMIT 1))'

/** Rework reported done in the test's cell, at its lift or below it, after it was sampled. */
export const SUPERSEDED =
  "EXISTS (SELECT 1 FROM `rework_cell` c JOIN `rework_order` o ON o.`site_id` = c.`site_id` AND o.`id` = c.`order_id` JOIN `rework_step` s ON s.`site_id` = o.`site_id` AND s.`order_id` = o.`id` AND s.`kind` = 'ready' WHERE c.`site_id` = t.`site_id` AND c.`cell` = t.`cell` AND o.`lift` <= t.`lift` AND s.`happened_at` >= t.`sampled_at` AND (c.`left_at` IS NULL OR c.`left_at` > s.`happened_at`))"

const LOT =
  '(SELECT pc.`lot_id` FROM `placement_cell` pc JOIN `placement` p ON p.`site_id` = pc.`site_id` AND p.`id` = pc.`placement_id` WHERE pc.`site_id` = t.`site_id` AND pc.`lift` = t.`lift` AND pc.`cell` = t.`cell` AND p.`voided_at` IS NULL ORDER BY p.`seq` LIMIT 1)'

const FROM =
  'FROM `field_test` t JOIN `user` u ON u.`id` = t.`recorded_by` JOIN `reference_curve` k ON k.`site_id` = t.`site_id` AND k.`id` = t.`curve_id`'

const SELECT = `SELECT t.\`id\`, t.\`number\`, t.\`seq\`, t.\`purpose\`, t.\`method\`, t.\`zone_id\`, t.\`lift\`, t.\`cell\`, ${LOT} AS \`lot_id\`, t.\`easting\`, t.\`northing\`, t.\`sampled_at\`, t.\`recorded_by\`, u.\`name\` AS \`recorder\`, t.\`curve_id\`, k.\`code\` AS \`curve_code\`, t.\`outcome\`, t.\`treated_as_fail\`, t.\`near\`, t.\`headline\`, t.\`rc\`, t.\`moisture\`, t.\`moisture_deviation\`, t.\`dry_density\`, ${CURRENT} AS \`current\`, ${SUPERSEDED} AS \`superseded\`, t.\`voided_at\`, JSON_LENGTH(t.\`flags\`) AS \`flag_count\`, ${USES_GAUGE} AS \`uses_gauge\`, t.\`gauge_id\` ${FROM}`

interface Where {
  readonly text: string
  readonly values: readonly unknown[]
}

function whereOf(siteId: string, query: Omit<TestQuery, 'offset' | 'limit'>): Where {
  const parts: [string, ...unknown[]][] = [['t.`site_id` = ?', siteId]]
  if (query.zoneId !== undefined) parts.push(['t.`zone_id` = ?', query.zoneId])
  if (query.lift !== undefined) parts.push(['t.`lift` = ?', query.lift])
  if (query.cell !== undefined) parts.push(['t.`cell` = ?', query.cell])
  if (query.lotId !== undefined) parts.push([`${LOT} = ?`, query.lotId])
  if (query.outcome !== undefined) parts.push(['t.`outcome` = ?', query.outcome])
  if (query.current !== undefined) parts.push([query.current === 'true' ? CURRENT : `NOT ${CURRENT}`])
  if (query.search !== undefined && query.search.trim() !== '') {
    const like = `%${query.search.trim().replace(/[\\%_]/g, '\\$&')}%`
    parts.push(['(t.`number` LIKE ? OR k.`code` LIKE ? OR t.`headline` LIKE ? OR u.`name` LIKE ?)', like, like, like, like])
  }
  return { text: parts.map(([text]) => text).join(' AND '), values: parts.flatMap(([, ...values]) => values) }
}

/** One page of a site's tests, newest first, and how many there are in all. */
export async function listTests(manager: EntityManager, siteId: string, query: TestQuery): Promise<{ tests: TestSummary[]; total: number }> {
  const where = whereOf(siteId, query)
  const rows: SummaryRow[] = await manager.query(`${SELECT} WHERE ${where.text} ORDER BY t.\`seq\` DESC LIMIT ? OFFSET ?`, [...where.values, query.limit, query.offset])
  const [{ total }]: [{ total: string }] = await manager.query(`SELECT COUNT(*) AS \`total\` ${FROM} WHERE ${where.text}`, [...where.values])
  return { tests: await presentSummaries(manager, siteId, rows), total: Number(total) }
}

/** A test of this site as lists show it, or null. */
export async function loadTestSummary(manager: EntityManager, siteId: string, id: string): Promise<TestSummary | null> {
  const rows: SummaryRow[] = await manager.query(`${SELECT} WHERE t.\`site_id\` = ? AND t.\`id\` = ?`, [siteId, id])
  const [summary] = await presentSummaries(manager, siteId, rows)
  return summary ?? null
}

/** A test is flagged by what its sheet says, and by a gauge that was not good when it was taken. */
async function presentSummaries(manager: EntityManager, siteId: string, rows: readonly SummaryRow[]): Promise<TestSummary[]> {
  const byGauge = rows.filter((row) => Number(row.uses_gauge) === 1)
  const checks = byGauge.length === 0 ? new Map<string, TestGauge>() : await loadGaugeChecks(manager, siteId, byGauge.map((row) => ({ id: row.id, gaugeId: row.gauge_id, sampledAt: row.sampled_at })))
  return rows.map((row) => {
    const gauge = checks.get(row.id)
    return { ...presentSummary(row), flagged: Number(row.flag_count) > 0 || (gauge !== undefined && gauge.state !== 'good') }
  })
}

function presentSummary(row: SummaryRow): Omit<TestSummary, 'flagged'> {
  return {
    id: row.id,
    number: row.number,
    seq: row.seq,
    purpose: row.purpose,
    method: row.method,
    zoneId: row.zone_id,
    lift: row.lift,
    cell: row.cell,
    lotId: row.lot_id,
    easting: row.easting,
    northing: row.northing,
    sampledAt: row.sampled_at.toISOString(),
    recordedBy: { id: row.recorded_by, name: row.recorder },
    curveId: row.curve_id,
    curveCode: row.curve_code,
    outcome: row.outcome,
    treatedAsFail: Boolean(row.treated_as_fail),
    near: Boolean(row.near),
    headline: row.headline,
    rc: row.rc,
    moisture: row.moisture,
    moistureDeviation: row.moisture_deviation,
    dryDensity: row.dry_density,
    current: Number(row.current) === 1,
    superseded: Number(row.superseded) === 1,
    voided: row.voided_at !== null,
  }
}
