import type { EntityManager } from 'typeorm'
import { loadGaugeChecks, USES_GAUGE } from '#api/features/gauges/gauge-checks.queries.ts'
import { LOT } from '#api/features/tests/register-columns.ts'
import { stepFor } from '#shared/domain/limits.ts'
import type { Reason } from '#shared/domain/result.ts'
import type { Verdict } from '#shared/domain/verdict-types.ts'
import type { TestGauge } from '#shared/schemas/gauge.ts'
import type { RegisterTest } from '#shared/schemas/test-register.ts'

interface Row {
  readonly id: string
  readonly number: string
  readonly seq: number
  readonly purpose: RegisterTest['purpose']
  readonly method: RegisterTest['method']
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
  readonly outcome: RegisterTest['outcome']
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
  readonly uses_gauge: number
  readonly gauge_id: string | null
  readonly follow_kind: RegisterTest['followKind']
  readonly lot_name: string | null
  readonly moisture_method: RegisterTest['moistureMethod']
  readonly material_id: string
  readonly material_name: string
  readonly wet_density: number
  readonly oversize_percent: string | null
  readonly recorded_at: Date
  readonly verdict: Verdict
  readonly flags: readonly Reason[]
}

/** The last of a chain that is not void, as the ground reads it (lot-tests.queries.ts). */
export const CURRENT =
  '(t.`id` = (SELECT n.`id` FROM `field_test` n WHERE n.`site_id` = t.`site_id` AND n.`chain_id` = t.`chain_id` AND n.`voided_at` IS NULL ORDER BY n.`sampled_at` DESC, n.`seq` DESC LIMIT 1))'

/** Rework reported done in the test's cell, at its lift or below it, after it was sampled. */
export const SUPERSEDED =
  "EXISTS (SELECT 1 FROM `rework_cell` c JOIN `rework_order` o ON o.`site_id` = c.`site_id` AND o.`id` = c.`order_id` JOIN `rework_step` s ON s.`site_id` = o.`site_id` AND s.`order_id` = o.`id` AND s.`kind` = 'ready' WHERE c.`site_id` = t.`site_id` AND c.`cell` = t.`cell` AND o.`lift` <= t.`lift` AND s.`happened_at` >= t.`sampled_at` AND (c.`left_at` IS NULL OR c.`left_at` > s.`happened_at`))"

const COLUMNS = [
  ...['id', 'number', 'seq', 'purpose', 'method', 'zone_id', 'lift', 'cell', 'easting', 'northing', 'sampled_at', 'recorded_by', 'recorded_at', 'curve_id', 'outcome', 'treated_as_fail', 'near', 'headline', 'rc', 'moisture', 'moisture_deviation', 'dry_density', 'wet_density', 'oversize_percent', 'voided_at', 'gauge_id', 'follow_kind', 'verdict', 'flags'].map((name) => `t.\`${name}\``),
  `${LOT} AS \`lot_id\``,
  'u.`name` AS `recorder`, k.`code` AS `curve_code`, m.`id` AS `material_id`, m.`name` AS `material_name`',
  "JSON_VALUE(t.`sheet`, '$.moisture.method') AS `moisture_method`",
  `${CURRENT} AS \`current\`, ${SUPERSEDED} AS \`superseded\`, ${USES_GAUGE} AS \`uses_gauge\``,
].join(', ')

const SELECT = `SELECT x.*, l.\`name\` AS \`lot_name\` FROM (SELECT t.\`site_id\`, ${COLUMNS} FROM \`field_test\` t JOIN \`user\` u ON u.\`id\` = t.\`recorded_by\` JOIN \`reference_curve\` k ON k.\`site_id\` = t.\`site_id\` AND k.\`id\` = t.\`curve_id\` JOIN \`borrow_material\` m ON m.\`site_id\` = k.\`site_id\` AND m.\`id\` = k.\`material_id\` WHERE t.\`site_id\` = ? AND t.\`id\` IN (?)) x LEFT JOIN \`lot\` l ON l.\`site_id\` = x.\`site_id\` AND l.\`id\` = x.\`lot_id\``

/** Tests of this site as lists show them, in the order of their ids; those that are not there are left out. */
export async function loadTests(manager: EntityManager, siteId: string, ids: readonly string[]): Promise<RegisterTest[]> {
  if (ids.length === 0) return []
  const rows: Row[] = await manager.query(SELECT, [siteId, ids])
  const byGauge = rows.filter((row) => Number(row.uses_gauge) === 1)
  const gauges = byGauge.length === 0 ? new Map<string, TestGauge>() : await loadGaugeChecks(manager, siteId, byGauge.map((row) => ({ id: row.id, gaugeId: row.gauge_id, sampledAt: row.sampled_at })))
  const tests = new Map(rows.map((row) => [row.id, present(row, gauges.get(row.id))]))
  return ids.flatMap((id) => tests.get(id) ?? [])
}

/** A test of this site as lists show it, or null. */
export async function loadTestSummary(manager: EntityManager, siteId: string, id: string): Promise<RegisterTest | null> {
  const [test] = await loadTests(manager, siteId, [id])
  return test ?? null
}

/** A test is flagged by what its sheet says, and by a gauge that was not good when it was taken. */
function flagsOf(row: Row, gauge: TestGauge | undefined): Reason[] {
  return gauge === undefined || gauge.state === 'good' ? [...row.flags] : [...row.flags, { code: `gauge-${gauge.state}`, message: gauge.message }]
}

/** The minimum compaction the verdict was judged by, as it is written. */
function rcLimitOf({ against }: Verdict): string | null {
  for (const criterion of against.criteria) {
    if (criterion.kind === 'rc-min') return criterion.text
    const step = criterion.kind === 'rc-min-steps' ? stepFor(criterion.steps, against.curve.maxDryDensity) : undefined
    if (step !== undefined) return step
  }
  return null
}

function present(row: Row, gauge: TestGauge | undefined): RegisterTest {
  const { verdict } = row
  const flags = flagsOf(row, gauge)
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
    lotName: row.lot_name,
    easting: row.easting,
    northing: row.northing,
    sampledAt: row.sampled_at.toISOString(),
    recordedAt: row.recorded_at.toISOString(),
    recordedBy: { id: row.recorded_by, name: row.recorder },
    curveId: row.curve_id,
    curveCode: row.curve_code,
    materialId: row.material_id,
    materialName: row.material_name,
    outcome: row.outcome,
    treatedAsFail: Boolean(row.treated_as_fail),
    near: Boolean(row.near),
    headline: row.headline,
    rc: row.rc,
    rcLimit: rcLimitOf(verdict),
    moisture: row.moisture,
    moistureMethod: row.moisture_method,
    moistureDeviation: row.moisture_deviation,
    optimum: verdict.optimumUsed,
    maxDryDensity: verdict.maxDryDensityUsed,
    dryDensity: row.dry_density,
    wetDensity: row.wet_density,
    oversizePercent: row.oversize_percent === null ? null : Number(row.oversize_percent),
    oversizeCorrected: verdict.oversizeCorrected,
    saturation: verdict.saturation,
    airVoids: verdict.airVoids,
    followKind: row.follow_kind,
    current: Number(row.current) === 1,
    superseded: Number(row.superseded) === 1,
    voided: row.voided_at !== null,
    flagged: flags.length > 0,
    flags,
  }
}
