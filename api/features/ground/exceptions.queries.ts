import type { EntityManager } from 'typeorm'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { releaseNumber } from '#api/features/releases/releases.service.ts'
import { placementNumber } from '#api/features/placements/record-placement.service.ts'
import { GROUND_FLAGS } from '#shared/domain/ground-state.ts'
import { VOLUME_DIFFERENCE_LIMIT_PERCENT } from '#shared/domain/placement-volume.ts'
import type { Board } from '#shared/schemas/ground.ts'

type Exception = Board['exceptions'][number]

/** What stands on the record as out of the ordinary, for the owner: open ones and those that stay for good. */
export async function loadExceptions(manager: EntityManager, plan: SitePlan): Promise<Exception[]> {
  const siteId = plan.site.id
  return [
    ...(await coveredEarly(manager, plan)),
    ...(await held(manager, siteId)),
    ...(await flaggedTests(manager, siteId)),
    ...(await rejudgedFailures(manager, siteId)),
    ...(await overrides(manager, siteId)),
    ...(await volumeDifferences(manager, siteId)),
  ]
}

async function coveredEarly(manager: EntityManager, plan: SitePlan): Promise<Exception[]> {
  const rows: { zone_id: string; lift: number; cell: number }[] = await manager.query(
    'SELECT `zone_id`, `lift`, `cell` FROM `cell_lift` WHERE `site_id` = ? AND (`flags` & ?) <> 0 ORDER BY `zone_id`, `lift`, `cell`',
    [plan.site.id, GROUND_FLAGS.covered],
  )
  const groups = new Map<string, { zoneId: string; lift: number; cells: number[] }>()
  for (const row of rows) {
    const key = `${row.zone_id} ${row.lift}`
    const group = groups.get(key) ?? { zoneId: row.zone_id, lift: row.lift, cells: [] }
    group.cells.push(row.cell)
    groups.set(key, group)
  }
  return [...groups.values()].map(({ zoneId, lift, cells }) => ({
    kind: 'covered-early',
    text: `${countOf(cells.length, 'cell')} covered too early`,
    detail: `${plan.zone(zoneId).name}, ${lift === 0 ? 'foundation' : `lift ${lift}`}`,
    cells,
    lift,
    testId: null,
  }))
}

async function held(manager: EntityManager, siteId: string): Promise<Exception[]> {
  const rows: { lift: number; cell: number }[] = await manager.query(
    'SELECT `lift`, `cell` FROM `cell_lift` WHERE `site_id` = ? AND (`flags` & ?) <> 0 ORDER BY `lift`, `cell`',
    [siteId, GROUND_FLAGS.hold],
  )
  if (rows.length === 0) return []
  return [{ kind: 'hold', text: `${countOf(rows.length, 'cell')} on hold`, detail: 'a verification test fails there', cells: rows.map((row) => row.cell), lift: rows[0]?.lift ?? null, testId: null }]
}

async function flaggedTests(manager: EntityManager, siteId: string): Promise<Exception[]> {
  const rows: { id: string; number: string; cell: number; lift: number; voided: number; unreworked: number; void_reason: string | null }[] = await manager.query(
    "SELECT `id`, `number`, `cell`, `lift`, `voided_at` IS NOT NULL AS `voided`, JSON_SEARCH(`flags`, 'one', 'retest-without-rework', NULL, '$[*].code') IS NOT NULL AS `unreworked`, `void_reason` FROM `field_test` WHERE `site_id` = ? AND (JSON_SEARCH(`flags`, 'one', 'retest-without-rework', NULL, '$[*].code') IS NOT NULL OR (`voided_at` IS NOT NULL AND (`outcome` = 'fail' OR `treated_as_fail` = 1))) ORDER BY `seq` DESC",
    [siteId],
  )
  return rows.map((row) =>
    Number(row.voided)
      ? { kind: 'voided-failure', text: `${row.number}, a failing test, was voided`, detail: row.void_reason ?? '', cells: [row.cell], lift: row.lift, testId: row.id }
      : { kind: 'retest-without-rework', text: `${row.number}: retest without recorded rework`, detail: '', cells: [row.cell], lift: row.lift, testId: row.id },
  )
}

/** Failures that the last judging lets pass, with its reason: they stay on the record as voided ones do. */
async function rejudgedFailures(manager: EntityManager, siteId: string): Promise<Exception[]> {
  const rows: { id: string; number: string; cell: number; lift: number; code: string; reason: string | null }[] = await manager.query(
    "SELECT t.`id`, t.`number`, t.`cell`, t.`lift`, k.`code`, (SELECT l.`reason` FROM `test_verdict` l WHERE l.`site_id` = t.`site_id` AND l.`test_id` = t.`id` ORDER BY l.`version` DESC LIMIT 1) AS `reason` FROM `field_test` t JOIN `reference_curve` k ON k.`site_id` = t.`site_id` AND k.`id` = t.`curve_id` WHERE t.`site_id` = ? AND t.`voided_at` IS NULL AND t.`outcome` = 'pass' AND EXISTS (SELECT 1 FROM `test_verdict` v WHERE v.`site_id` = t.`site_id` AND v.`test_id` = t.`id` AND (JSON_VALUE(v.`verdict`, '$.outcome') = 'fail' OR JSON_VALUE(v.`verdict`, '$.treatedAsFail') IN ('true', '1'))) ORDER BY t.`seq` DESC",
    [siteId],
  )
  return rows.map((row) => ({ kind: 'rejudged-failure', text: `${row.number}, a failing test, was judged again by ${row.code} and passes`, detail: row.reason ?? '', cells: [row.cell], lift: row.lift, testId: row.id }))
}

async function overrides(manager: EntityManager, siteId: string): Promise<Exception[]> {
  const rows: { id: string; seq: number; lift: number; override_reason: string }[] = await manager.query(
    'SELECT `id`, `seq`, `lift`, `override_reason` FROM `release_record` WHERE `site_id` = ? AND `override_reason` IS NOT NULL ORDER BY `seq` DESC',
    [siteId],
  )
  return rows.map((row) => ({ kind: 'override', text: `${releaseNumber(row.seq)} released with the frequency short`, detail: row.override_reason, cells: [], lift: row.lift, testId: null }))
}

async function volumeDifferences(manager: EntityManager, siteId: string): Promise<Exception[]> {
  const rows: { seq: number; lift: number; geometry_cm3: string; loads_cm3: string }[] = await manager.query(
    'SELECT `seq`, `lift`, `geometry_cm3`, `loads_cm3` FROM `placement` WHERE `site_id` = ? AND `voided_at` IS NULL AND `loads` > 0 AND ABS(`loads_cm3` - `geometry_cm3`) * 100 > ? * `geometry_cm3` ORDER BY `seq` DESC',
    [siteId, VOLUME_DIFFERENCE_LIMIT_PERCENT],
  )
  return rows.map((row) => {
    const percent = (100 * (Number(row.loads_cm3) - Number(row.geometry_cm3))) / Number(row.geometry_cm3)
    return { kind: 'volume-difference', text: `${placementNumber(row.seq)}: loads and geometry differ by ${Math.abs(percent).toFixed(0)} %`, detail: percent > 0 ? 'more hauled than the cells hold' : 'less hauled than the cells hold', cells: [], lift: row.lift, testId: null }
  })
}

function countOf(n: number, word: string): string {
  return n === 1 ? `1 ${word}` : `${n} ${word}s`
}
