import type { EntityManager } from 'typeorm'
import { loadExceptions } from '#api/features/ground/exceptions.queries.ts'
import { loadGroundTotals } from '#api/features/ground/ground-totals.queries.ts'
import { loadNotYet } from '#api/features/ground/not-yet.queries.ts'
import { layerOf } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { GROUND_STATES, groundStateCode, groundStateOf } from '#shared/domain/ground-state.ts'
import type { Board } from '#shared/schemas/ground.ts'

interface TotalRow {
  readonly zone_id: string
  readonly lift: number
  readonly state: number
  readonly cells: number
  readonly cm3: string
}

/** Everything panel, rail and title block say, of one revision. */
export async function loadBoard(manager: EntityManager, plan: SitePlan, now: Date, revision: number): Promise<Board> {
  const siteId = plan.site.id
  const totals: TotalRow[] = await manager.query(
    'SELECT `zone_id`, `lift`, `state`, `cells`, `cm3` FROM `lift_total` WHERE `site_id` = ? AND `cells` > 0 ORDER BY `zone_id`, `lift`, `state`',
    [siteId],
  )
  return {
    revision,
    at: now.toISOString(),
    totals: await loadGroundTotals(manager, plan, now),
    lifts: liftTotals(plan, totals),
    ready: await loadReady(manager, plan),
    notYet: await loadNotYet(manager, plan),
    zones: await zoneTotals(manager, plan, totals),
    doubtful: await loadDoubtful(manager, siteId),
    exceptions: await loadExceptions(manager, plan),
    verification: await loadVerification(manager, siteId),
  }
}

/** Placed shares of every lift of every zone, and what is planned there and not placed. */
function liftTotals(plan: SitePlan, rows: readonly TotalRow[]): Board['lifts'] {
  const planned = new Map<string, { zoneId: string; lift: number; cells: number; cm3: number }>()
  for (const { cell, areaMm2 } of plan.cells) {
    const zone = plan.zoneOf(cell)
    if (!zone) continue
    for (const layer of plan.layersOf(cell)) {
      const key = `${zone.id} ${layer.lift}`
      const total = planned.get(key) ?? { zoneId: zone.id, lift: layer.lift, cells: 0, cm3: 0 }
      total.cells++
      total.cm3 += Math.round((areaMm2 * (layer.topUm - layer.bottomUm)) / 1e6)
      planned.set(key, total)
    }
  }
  const lifts = new Map<string, Board['lifts'][number]>()
  for (const row of rows) {
    const key = `${row.zone_id} ${row.lift}`
    const lift = lifts.get(key) ?? { zoneId: row.zone_id, lift: row.lift, states: [] }
    lift.states.push({ state: groundStateOf(row.state), cells: row.cells, cm3: Number(row.cm3) })
    lifts.set(key, lift)
  }
  for (const [key, total] of planned) {
    const lift = lifts.get(key) ?? { zoneId: total.zoneId, lift: total.lift, states: [] }
    const placed = lift.states.reduce((sum, state) => sum + state.cells, 0)
    const placedCm3 = lift.states.reduce((sum, state) => sum + state.cm3, 0)
    if (placed < total.cells) lift.states.push({ state: 'not-placed', cells: total.cells - placed, cm3: Math.max(0, total.cm3 - placedCm3) })
    lifts.set(key, lift)
  }
  const order = new Map(plan.zones.map((zone) => [zone.id, zone.position]))
  return [...lifts.values()]
    .map((lift) => ({ ...lift, states: lift.states.sort((a, b) => GROUND_STATES.indexOf(a.state) - GROUND_STATES.indexOf(b.state)) }))
    .sort((a, b) => (order.get(a.zoneId) ?? 0) - (order.get(b.zoneId) ?? 0) || a.lift - b.lift)
}

async function loadReady(manager: EntityManager, plan: SitePlan): Promise<Board['ready']> {
  const rows: { cell: number; zone_id: string; next_lift: number; next_cm3: string }[] = await manager.query(
    'SELECT `cell`, `zone_id`, `next_lift`, `next_cm3` FROM `cell` WHERE `site_id` = ? AND `ready` = 1 ORDER BY `zone_index`, `next_lift`, `cell`',
    [plan.site.id],
  )
  const groups = new Map<string, Board['ready'][number]>()
  for (const row of rows) {
    const key = `${row.zone_id} ${row.next_lift}`
    const layer = layerOf(plan, row.cell, row.next_lift)
    const group = groups.get(key) ?? { zoneId: row.zone_id, lift: row.next_lift, cells: [], cm3: 0, topUm: 0, thicknessUm: plan.zone(row.zone_id).liftPlan.thicknessUm }
    groups.set(key, { ...group, cells: [...group.cells, row.cell], cm3: group.cm3 + Number(row.next_cm3), topUm: Math.max(group.topUm, layer?.topUm ?? 0) })
  }
  return [...groups.values()].sort((a, b) => b.cm3 - a.cm3)
}

async function zoneTotals(manager: EntityManager, plan: SitePlan, totals: readonly TotalRow[]): Promise<Board['zones']> {
  const lots: { zone_id: string; lots: string; owed: string }[] = await manager.query(
    "SELECT `zone_id`, COUNT(*) AS `lots`, SUM(`owed`) AS `owed` FROM `lot` WHERE `site_id` = ? AND `merged_into` IS NULL AND `standing` <> 'not-placed' GROUP BY `zone_id`",
    [plan.site.id],
  )
  const covered = [groundStateCode('released'), groundStateCode('accepted-as-is')]
  return plan.zones.map((zone) => {
    const own = totals.filter((row) => row.zone_id === zone.id)
    const sum = (rows: readonly TotalRow[]) => rows.reduce((total, row) => total + Number(row.cm3), 0)
    const counted = lots.find((row) => row.zone_id === zone.id)
    return {
      zoneId: zone.id,
      designCm3: zone.designCm3,
      placedCm3: sum(own),
      releasedCm3: sum(own.filter((row) => covered.includes(row.state))),
      lots: Number(counted?.lots ?? 0),
      owed: Number(counted?.owed ?? 0),
    }
  })
}

const CURRENT =
  't.`voided_at` IS NULL AND t.`id` = (SELECT n.`id` FROM `field_test` n WHERE n.`site_id` = t.`site_id` AND n.`chain_id` = t.`chain_id` AND n.`voided_at` IS NULL ORDER BY n.`sampled_at` DESC, n.`seq` DESC LIMIT 1)'

async function loadDoubtful(manager: EntityManager, siteId: string): Promise<Board['doubtful']> {
  const rows: { id: string; number: string; cell: number; lift: number; headline: string }[] = await manager.query(
    `SELECT t.\`id\`, t.\`number\`, t.\`cell\`, t.\`lift\`, t.\`headline\` FROM \`field_test\` t WHERE t.\`site_id\` = ? AND t.\`outcome\` = 'suspect' AND ${CURRENT} ORDER BY t.\`seq\` DESC`,
    [siteId],
  )
  return rows.map(({ id, ...row }) => ({ testId: id, ...row }))
}

async function loadVerification(manager: EntityManager, siteId: string): Promise<Board['verification']> {
  const [row]: { tests: string; failing: string | null }[] = await manager.query(
    `SELECT COUNT(*) AS \`tests\`, SUM(t.\`outcome\` = 'fail') AS \`failing\` FROM \`field_test\` t WHERE t.\`site_id\` = ? AND t.\`purpose\` = 'verification' AND ${CURRENT}`,
    [siteId],
  )
  return { tests: Number(row?.tests ?? 0), failing: Number(row?.failing ?? 0) }
}
