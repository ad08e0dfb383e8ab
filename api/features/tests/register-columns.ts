import type { EntityManager } from 'typeorm'
import { loadGaugeChecks, USES_GAUGE } from '#api/features/gauges/gauge-checks.queries.ts'
import type { RegisterKey, RegisterSort } from '#shared/schemas/test-register.ts'
import { convertDensity } from '#shared/units/density.ts'

/** The lot of a test's place: that of the first fill placed there which is not void. */
export const LOT =
  '(SELECT pc.`lot_id` FROM `placement_cell` pc JOIN `placement` p ON p.`site_id` = pc.`site_id` AND p.`id` = pc.`placement_id` WHERE pc.`site_id` = t.`site_id` AND pc.`lift` = t.`lift` AND pc.`cell` = t.`cell` AND p.`voided_at` IS NULL ORDER BY p.`seq` LIMIT 1)'

/** Ids of tests read with a gauge of the register that was not good; never empty, for the sake of IN. */
export type BadGauges = readonly [string, ...string[]]
export const NO_BAD_GAUGES: BadGauges = ['']

/** How many flags a test carries, its gauge's among them; takes the tests with a bad gauge as its one value. */
export const FLAG_COUNT = `(JSON_LENGTH(t.\`flags\`) + (${USES_GAUGE} AND (t.\`gauge_id\` IS NULL OR t.\`id\` IN (?))))`

/** Whether a gauge was good is worked out from its counts, not stored; asked for when tests are chosen or sorted by their flags. */
export async function loadBadGauges(manager: EntityManager, siteId: string): Promise<BadGauges> {
  const rows: { id: string; gauge_id: string; sampled_at: Date }[] = await manager.query(
    `SELECT t.\`id\`, t.\`gauge_id\`, t.\`sampled_at\` FROM \`field_test\` t WHERE t.\`site_id\` = ? AND t.\`gauge_id\` IS NOT NULL AND ${USES_GAUGE}`,
    [siteId],
  )
  if (rows.length === 0) return NO_BAD_GAUGES
  const checks = await loadGaugeChecks(manager, siteId, rows.map((row) => ({ id: row.id, gaugeId: row.gauge_id, sampledAt: row.sampled_at })))
  return ['', ...[...checks].filter(([, check]) => check.state !== 'good').map(([id]) => id)]
}

/** What differs by less is equal: the last digits of a quotient are noise. */
const double = (value: string): string => `ROUND(${value}, 9)`
const ofVerdict = (path: string): string => double(`CAST(JSON_VALUE(t.\`verdict\`, '$.${path}') AS DOUBLE)`)
const ofCurve = (select: string): string => `(SELECT ${select} FROM \`reference_curve\` k JOIN \`borrow_material\` m ON m.\`site_id\` = k.\`site_id\` AND m.\`id\` = k.\`material_id\` WHERE k.\`site_id\` = t.\`site_id\` AND k.\`id\` = t.\`curve_id\`)`
const ofCell = (column: string): string => `(SELECT c.\`${column}\` FROM \`cell\` c WHERE c.\`site_id\` = t.\`site_id\` AND c.\`cell\` = t.\`cell\`)`
const ZONE = '(SELECT z.`position` FROM `zone` z WHERE z.`site_id` = t.`site_id` AND z.`id` = t.`zone_id`)'

/** The minimum compaction of the verdict's first criterion that has one: its text, or the first step above the curve's maximum (limits.ts, stepFor). */
const RC_LIMIT = `(SELECT CAST(COALESCE(j.\`step\`, j.\`limit_text\`) AS DOUBLE) FROM JSON_TABLE(t.\`verdict\`, '$.against.criteria[*]' COLUMNS (\`place\` FOR ORDINALITY, \`kind\` VARCHAR(32) PATH '$.kind', \`limit_text\` VARCHAR(40) PATH '$.text', NESTED PATH '$.steps[*]' COLUMNS (\`step_place\` FOR ORDINALITY, \`below\` DOUBLE PATH '$.belowMaxDryPcf', \`step\` VARCHAR(40) PATH '$.text'))) j WHERE j.\`kind\` = 'rc-min' OR (j.\`kind\` = 'rc-min-steps' AND (j.\`below\` IS NULL OR ROUND(${ofVerdict('against.curve.maxDryDensity')} / ${convertDensity(1, 'pcf', 'kg/m3')}, 1) < j.\`below\`)) ORDER BY j.\`place\`, j.\`step_place\` LIMIT 1)`

/** What each column is sorted by, the first deciding; words as they stand on screen, numbers by what they say. */
const SORTED_BY: Readonly<Record<RegisterKey, readonly string[]>> = {
  number: ["REGEXP_SUBSTR(t.`number`, '^[^0-9]*')", "CAST(REGEXP_SUBSTR(t.`number`, '[0-9]{1,15}') AS DOUBLE)", 't.`number`'],
  sampled: ['t.`sampled_at`'],
  zone: [ZONE],
  lift: ['t.`lift`'],
  cell: [ofCell('grid_column'), ofCell('grid_row')],
  lot: [`(SELECT l.\`seq\` FROM \`lot\` l WHERE l.\`site_id\` = t.\`site_id\` AND l.\`id\` = ${LOT})`],
  purpose: ['t.`purpose`'],
  method: ['t.`method`'],
  moistureMethod: ["JSON_VALUE(t.`sheet`, '$.moisture.method')"],
  wetDensity: [double('t.`wet_density`')],
  dryDensity: [double('t.`dry_density`')],
  moisture: [double('t.`moisture`')],
  optimum: [ofVerdict('optimumUsed')],
  deviation: [double('t.`moisture_deviation`')],
  maxDryDensity: [ofVerdict('maxDryDensityUsed')],
  curve: [ofCurve('k.`code`')],
  material: [ofCurve('m.`name`')],
  oversize: ['t.`oversize_percent`'],
  rc: [double('t.`rc`')],
  rcLimit: [RC_LIMIT],
  saturation: [ofVerdict('saturation')],
  airVoids: [ofVerdict('airVoids')],
  outcome: ["FIELD(t.`outcome`, 'fail', 'suspect', 'pass')", '-t.`treated_as_fail`', '-t.`near`'],
  flags: [FLAG_COUNT],
  technician: ['(SELECT u.`name` FROM `user` u WHERE u.`id` = t.`recorded_by`)'],
  recorded: ['t.`seq`'],
}

/** Columns that may say nothing; such tests come last, whichever way they are sorted. */
const MAY_BE_EMPTY: ReadonlySet<RegisterKey> = new Set(['lot', 'oversize', 'rcLimit', 'saturation'])

/** The order of a page, the newest first among equals; `values` go into its question marks. */
export function orderOf({ key, direction }: RegisterSort, badGauges: BadGauges): { readonly text: string; readonly values: readonly unknown[] } {
  const parts = SORTED_BY[key].flatMap((column) => [...(MAY_BE_EMPTY.has(key) ? [`${column} IS NULL`] : []), `${column} ${direction}`])
  return { text: [...parts, 't.`seq` DESC'].join(', '), values: key === 'flags' ? [badGauges] : [] }
}
