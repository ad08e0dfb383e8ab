import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { AllocationEntity } from '#api/entities/allocation.entity.ts'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { loadGaugeChecks, USES_GAUGE } from '#api/features/gauges/gauge-checks.queries.ts'
import { cellsInZones } from '#api/features/ground/cells-in-zones.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { groundStateOf, mayBeCovered } from '#shared/domain/ground-state.ts'
import type { SharePair } from '#shared/domain/lot-facts.ts'
import { checkRelease } from '#shared/domain/release-check.ts'
import type { GaugeTrouble, ReleaseCell, ReleaseFinding } from '#shared/domain/release-check.ts'
import type { TestGauge } from '#shared/schemas/gauge.ts'

export interface CellToRelease {
  readonly row: CellLiftEntity
  /** the passing shares it would stand on */
  readonly pairs: readonly SharePair[]
}

export interface CheckedRelease {
  readonly red: readonly ReleaseFinding[]
  readonly amber: readonly ReleaseFinding[]
  readonly verdict: 'free' | 'with-reason' | 'blocked'
  readonly cells: readonly CellToRelease[]
  readonly volumeCm3: number
  readonly lots: readonly string[]
}

interface PassRow {
  readonly id: string
  readonly cell: number
  readonly sampled_at: Date
  readonly status: string
  readonly number: string
  readonly gauge: TestGauge | null
}

interface Asked {
  readonly zoneId: string
  readonly lift: number
  readonly cells: readonly number[]
}

/** The checklist of a release, lot by lot, from what is stored. */
export async function loadReleaseCheck(manager: EntityManager, plan: SitePlan, asked: Asked): Promise<CheckedRelease> {
  const siteId = plan.site.id
  const { lift } = asked
  const cells = cellsInZones(plan, asked.cells, asked.zoneId)
  const rows = await manager.findBy(CellLiftEntity, { siteId, lift, cell: In(cells) })
  const lotIds = [...new Set(rows.flatMap((row) => row.lotId ?? []))]
  const pairs = await loadPairs(manager, siteId, lotIds, cells)
  const passes = await loadPasses(manager, siteId, [...pairs.values()].flat().map((pair) => pair.testId))
  const coveredAt = await loadCovers(manager, siteId, lift, cells)
  const toRelease = (row: CellLiftEntity): ReleaseCell => ({
    cell: row.cell,
    state: groundStateOf(row.state),
    flags: row.flags,
    far: (pairs.get(row.cell) ?? []).some((pair) => pair.far),
    thicknessOff: false,
    coveredAt: coveredAt.get(row.cell) ?? null,
    passes: (pairs.get(row.cell) ?? []).flatMap((pair) => {
      const pass = passes.get(pair.testId)
      return pass ? [{ sampledAt: pass.sampled_at.getTime(), cell: pass.cell, curveApproved: pass.status !== 'draft', superseded: false, gauge: troubleOf(pass) }] : []
    }),
  })

  const missing = cells.filter((cell) => !rows.some((row) => row.cell === cell))
  const groups: (LotEntity | null)[] = lift === 0 || lotIds.length === 0 ? [null] : await manager.findBy(LotEntity, { siteId, id: In(lotIds) })
  const checks = []
  for (const [index, lot] of groups.entries()) {
    const inGroup = rows.filter((row) => lot === null || row.lotId === lot.id).map(toRelease)
    const nowhere = index === 0 ? missing.map(notPlaced) : []
    checks.push(
      checkRelease({
        lift,
        cells: [...inGroup, ...nowhere],
        lot: { owed: lot?.owed ?? 0, unreleased: lot ? await loadUnreleased(manager, siteId, lot.id) : [], gaugeChecksOwed: 0 },
      }),
    )
  }
  return {
    red: joined(checks.flatMap((check) => check.red)),
    amber: joined(checks.flatMap((check) => check.amber)),
    verdict: checks.some((check) => check.verdict === 'blocked') ? 'blocked' : checks.some((check) => check.verdict === 'with-reason') ? 'with-reason' : 'free',
    cells: rows.map((row) => ({ row, pairs: (pairs.get(row.cell) ?? []).map(({ testId, cell, cm3 }) => ({ testId, cell, cm3 })) })),
    volumeCm3: rows.reduce((sum, row) => sum + row.volumeCm3, 0),
    lots: lotIds,
  }
}

function notPlaced(cell: number): ReleaseCell {
  return { cell, state: 'not-placed', flags: 0, far: false, thicknessOff: false, coveredAt: null, passes: [] }
}

/** The same finding of several lots is one line. */
function joined(findings: readonly ReleaseFinding[]): ReleaseFinding[] {
  const byMessage = new Map<string, ReleaseFinding>()
  for (const finding of findings) {
    const known = byMessage.get(finding.message)
    byMessage.set(finding.message, known ? { ...finding, cells: [...known.cells, ...finding.cells] } : finding)
  }
  return [...byMessage.values()]
}

/** Shares of passing tests; a failing test holds volume too but nothing is released on it. */
async function loadPairs(manager: EntityManager, siteId: string, lotIds: readonly string[], cells: readonly number[]): Promise<Map<number, AllocationEntity[]>> {
  if (lotIds.length === 0) return new Map()
  const rows = await manager
    .createQueryBuilder(AllocationEntity, 'a')
    .innerJoin('field_test', 't', "t.site_id = a.siteId AND t.id = a.testId AND t.outcome = 'pass'")
    .where('a.siteId = :siteId AND a.lotId IN (:...lotIds) AND a.cell IN (:...cells)', { siteId, lotIds, cells })
    .getMany()
  const byCell = new Map<number, AllocationEntity[]>()
  for (const row of rows) byCell.set(row.cell, [...(byCell.get(row.cell) ?? []), row])
  return byCell
}

async function loadPasses(manager: EntityManager, siteId: string, testIds: readonly string[]): Promise<Map<string, PassRow>> {
  if (testIds.length === 0) return new Map()
  const rows: (Omit<PassRow, 'gauge'> & { uses_gauge: number; gauge_id: string | null })[] = await manager.query(
    `SELECT t.\`id\`, t.\`number\`, t.\`cell\`, t.\`sampled_at\`, c.\`status\`, t.\`gauge_id\`, ${USES_GAUGE} AS \`uses_gauge\` FROM \`field_test\` t JOIN \`reference_curve\` c ON c.\`site_id\` = t.\`site_id\` AND c.\`id\` = t.\`curve_id\` WHERE t.\`site_id\` = ? AND t.\`id\` IN (?)`,
    [siteId, [...new Set(testIds)]],
  )
  const byGauge = rows.filter((row) => Number(row.uses_gauge) === 1)
  const gauges = await loadGaugeChecks(manager, siteId, byGauge.map((row) => ({ id: row.id, gaugeId: row.gauge_id, sampledAt: row.sampled_at })))
  return new Map(rows.map((row) => [row.id, { ...row, gauge: gauges.get(row.id) ?? null }]))
}

/** What is wrong now with the gauges behind these tests, as far as it holds a release. */
export async function loadUncheckedGauges(manager: EntityManager, siteId: string, testIds: readonly string[]): Promise<GaugeTrouble[]> {
  const passes = await loadPasses(manager, siteId, testIds)
  return [...passes.values()].flatMap((pass) => troubleOf(pass) ?? []).filter((trouble) => trouble.kind === 'not-checked')
}

function troubleOf({ number, gauge }: PassRow): GaugeTrouble | null {
  if (gauge === null || gauge.state === 'good') return null
  return { kind: gauge.state === 'not-named' ? 'not-named' : 'not-checked', test: number, message: gauge.message }
}

/** When a higher lift first covered each cell. */
async function loadCovers(manager: EntityManager, siteId: string, lift: number, cells: readonly number[]): Promise<Map<number, number>> {
  const rows: { cell: number; at: Date }[] = await manager.query(
    'SELECT pc.`cell`, MIN(p.`happened_at`) AS `at` FROM `placement_cell` pc JOIN `placement` p ON p.`site_id` = pc.`site_id` AND p.`id` = pc.`placement_id` WHERE pc.`site_id` = ? AND pc.`lift` > ? AND pc.`cell` IN (?) AND p.`voided_at` IS NULL GROUP BY pc.`cell`',
    [siteId, lift, cells],
  )
  return new Map(rows.map((row) => [row.cell, row.at.getTime()]))
}

async function loadUnreleased(manager: EntityManager, siteId: string, lotId: string): Promise<number[]> {
  const rows = await manager.findBy(CellLiftEntity, { siteId, lotId })
  return rows.filter((row) => !mayBeCovered(groundStateOf(row.state))).map((row) => row.cell)
}
