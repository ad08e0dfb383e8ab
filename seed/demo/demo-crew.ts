import type { Deps } from '#api/deps.ts'
import { recordInspection } from '#api/features/inspections/record-inspection.service.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { recordPlacement } from '#api/features/placements/record-placement.service.ts'
import { findOrder } from '#api/features/rework/orders.queries.ts'
import { stepOrder } from '#api/features/rework/step-order.service.ts'
import { acceptRelease, createRelease } from '#api/features/releases/releases.service.ts'
import { isHoldPoint } from '#api/features/releases/holds.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { drawStakes } from '#api/features/stakes/draw-stakes.service.ts'
import { recordsTests } from '#api/features/tests/test-rights.ts'
import { recordTest } from '#api/features/tests/record-test.service.ts'
import { groundStateCode } from '#shared/domain/ground-state.ts'
import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { OrderStepInput } from '#shared/schemas/rework.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { DemoIds } from '#seed/demo/demo-people.ts'
import type { Chance } from '#seed/demo/demo-random.ts'

/** Loose volume a truck brings: 16 cy. */
const TRUCK_CM3 = Math.round(convertVolume(16, 'yd3', 'cm3'))

type RunOptions = { readonly verb: Parameters<typeof can>[1] } | { readonly authorize: (role: Role) => boolean }

interface CrewOptions {
  readonly deps: Deps
  readonly siteId: string
  readonly people: DemoIds
  readonly chance: Chance
  readonly setClock: (now: Date) => void
}

export interface Placing {
  readonly zoneId: string
  readonly lift: number
  readonly cells: readonly number[]
  readonly materialId: string
  readonly looseToCompacted: number
  readonly machine: string
  readonly at: Date
  readonly coverReason?: string
}

export interface TestAt {
  readonly zoneId: string
  readonly lift: number
  readonly curveId: string
  readonly place: { readonly easting: number; readonly northing: number }
  readonly sheet: CreateTest['sheet']
  readonly at: Date
  readonly stakeId?: string
  readonly purpose?: CreateTest['purpose']
  readonly follows?: CreateTest['follows']
  readonly remarks?: string
}

/** The five people at work: each act is the service a click would call, at the time it is said to have happened. */
export class Crew {
  constructor(private readonly options: CrewOptions) {}

  private run<T>(role: Role, at: Date, permission: RunOptions, work: (write: SiteWrite) => Promise<T>): Promise<T> {
    const { deps, siteId, people, setClock } = this.options
    setClock(at)
    return writeToSite(deps, { siteId, userId: people[role], ...permission }, work)
  }

  plan(): Promise<SitePlan> {
    return loadSitePlan(this.options.deps.dataSource.manager, this.options.siteId)
  }

  async prepareFoundation(plan: SitePlan, zoneId: string, cells: readonly number[], at: Date): Promise<void> {
    const { chance } = this.options
    const happenedAt = at.toISOString()
    await this.run('technician', at, { verb: 'inspection.record' }, (write) =>
      recordInspection(write, { id: chance.id(), cells: [...cells], happenedAt, method: 'proof-roll', outcome: 'accepted', remarks: 'Loaded tandem truck, no pumping' }),
    )
    await this.release(plan, zoneId, 0, cells, new Date(at.getTime() + 30 * 60_000))
  }

  /** The cells of these that may receive this lift now. */
  async readyFor(lift: number, cells: readonly number[]): Promise<number[]> {
    const { deps, siteId } = this.options
    const rows: { cell: number }[] = await deps.dataSource.query('SELECT `cell` FROM `cell` WHERE `site_id` = ? AND `ready` = 1 AND `next_lift` = ? AND `cell` IN (?) ORDER BY `cell`', [siteId, lift, cells])
    return rows.map((row) => row.cell)
  }

  /** Places a lift and returns the lots it made; loads come out near the geometry's volume. */
  async place(plan: SitePlan, { at, cells, looseToCompacted, coverReason = '', ...placing }: Placing): Promise<string[]> {
    const { chance, deps, siteId } = this.options
    const compacted = cells.reduce((sum, cell) => {
      const layer = plan.layersOf(cell).find((own) => own.lift === placing.lift)
      return sum + (layer ? ((plan.cells[cell]?.areaMm2 ?? 0) * (layer.topUm - layer.bottomUm)) / 1e6 : 0)
    }, 0)
    const loads = Math.max(1, Math.round((compacted / looseToCompacted / TRUCK_CM3) * chance.uniform(0.97, 1.06)))
    const { id } = await this.run('superintendent', at, { verb: 'placement.record' }, (write) =>
      recordPlacement(write, {
        ...placing,
        id: chance.id(),
        cells: cells.map((cell) => ({ cell, quarters: 15 })),
        happenedAt: at.toISOString(),
        loads,
        loadVolumeCm3: TRUCK_CM3,
        looseThicknessUm: 254_000,
        passes: 6,
        remarks: '',
        coverReason: coverReason === '' ? null : coverReason,
      }),
    )
    const rows: { lot_id: string }[] = await deps.dataSource.query('SELECT DISTINCT `lot_id` FROM `placement_cell` WHERE `site_id` = ? AND `placement_id` = ? ORDER BY `lot_id`', [siteId, id])
    return rows.map((row) => row.lot_id)
  }

  /** Lots that owe tests no stake stands for, with their cells. */
  async lotsShort(): Promise<{ lotId: string; zoneId: string; lift: number; cells: number[] }[]> {
    const { deps, siteId } = this.options
    const rows: { id: string; zone_id: string; lift: number; cell: number }[] = await deps.dataSource.query(
      'SELECT l.`id`, l.`zone_id`, l.`lift`, s.`cell` FROM `lot` l JOIN `cell_lift` s ON s.`site_id` = l.`site_id` AND s.`lot_id` = l.`id` WHERE l.`site_id` = ? AND l.`to_stake` > 0 ORDER BY l.`seq`, s.`cell`',
      [siteId],
    )
    const lots = new Map<string, { lotId: string; zoneId: string; lift: number; cells: number[] }>()
    for (const row of rows) {
      const lot = lots.get(row.id) ?? { lotId: row.id, zoneId: row.zone_id, lift: row.lift, cells: [] }
      lot.cells.push(row.cell)
      lots.set(row.id, lot)
    }
    return [...lots.values()]
  }

  async draw(lotId: string, at: Date): Promise<readonly Stake[]> {
    const { chance } = this.options
    const { stakes } = await this.run('qc-lead', at, { verb: 'stake.draw' }, (write) => drawStakes(write, { id: chance.id(), lotId }, chance.seed()))
    return stakes
  }

  test({ zoneId: _zone, place, sheet, at, stakeId, purpose = 'required', follows = null, remarks = '', ...test }: TestAt) {
    const { chance } = this.options
    const role: Role = purpose === 'verification' ? 'owner-rep' : 'technician'
    return this.run(role, at, { authorize: recordsTests }, (write) =>
      recordTest(write, {
        ...test,
        id: chance.id(),
        purpose,
        follows,
        stakeId: stakeId ?? null,
        at: { easting: Math.round(place.easting * 100) / 100, northing: Math.round(place.northing * 100) / 100 },
        liftConfirmed: false,
        surfaceUm: null,
        depthUm: 152_400,
        sampledAt: at.toISOString(),
        oversizePercent: null,
        sheet,
        remarks,
      }),
    )
  }

  /** The lead releases what meets specification of these cells; at a hold point the owner accepts half an hour later. */
  async release(plan: SitePlan, zoneId: string, lift: number, cells: readonly number[], at: Date, accept = true): Promise<void> {
    const { chance, deps, siteId } = this.options
    const rows: { cell: number }[] = await deps.dataSource.query('SELECT `cell` FROM `cell_lift` WHERE `site_id` = ? AND `lift` = ? AND `cell` IN (?) AND `state` = ? ORDER BY `cell`', [
      siteId,
      lift,
      cells,
      groundStateCode('meets-spec'),
    ])
    if (rows.length === 0) return
    const releasable = rows.map((row) => row.cell)
    const { id } = await this.run('qc-lead', at, { verb: 'release.issue' }, (write) =>
      createRelease(write, { id: chance.id(), zoneId, lift, cells: releasable, happenedAt: at.toISOString(), overrideReason: null, remarks: '' }),
    )
    if (!accept || !isHoldPoint(plan, plan.zone(zoneId), lift, releasable)) return
    await this.run('owner-rep', new Date(at.getTime() + 30 * 60_000), { verb: 'release.accept' }, (write) => acceptRelease(write, id))
  }

  step(orderId: string, at: Date, step: OrderStepInput, role: Role = 'operator'): Promise<unknown> {
    const { chance } = this.options
    return this.run(role, at, { authorize: (own) => can(own, 'rework.work') || can(own, 'rework.assign') }, (write) => stepOrder(write, orderId, step, chance.seed()))
  }

  async order(orderId: string) {
    const order = await findOrder(this.options.deps.dataSource.manager, await this.plan(), orderId)
    if (!order) throw new Error(`No order ${orderId}`)
    return order
  }

  id(): string {
    return this.options.chance.id()
  }
}
