import type { SitePlan } from '#api/features/ground/site-plan.ts'
import type { Outcome } from '#shared/domain/verdict-types.ts'
import type { Crew } from '#seed/demo/demo-crew.ts'
import type { Day } from '#seed/demo/demo-calendar.ts'
import type { Shift } from '#seed/demo/demo-panels.ts'
import type { Apparatus } from '#seed/demo/demo-apparatus.ts'
import type { Chance } from '#seed/demo/demo-random.ts'
import type { GaugeLog } from '#seed/demo/demo-gauges.ts'
import { gaugeSheet, sandConeSheet } from '#seed/demo/demo-sheets.ts'
import type { Reading } from '#seed/demo/demo-sheets.ts'
import type { Stake } from '#shared/schemas/lot.ts'

/** A borrow material with its curve and the machine that rolls it. */
export interface Fill {
  readonly materialId: string
  readonly looseToCompacted: number
  readonly curveId: string
  /** pcf */
  readonly maximum: number
  readonly optimum: number
  /** pcf at zero air voids, so that no reading of the demo is impossible by chance */
  readonly zeroAirVoids: (moisture: number) => number
  readonly machine: string
  /** stones that no cylinder is driven into */
  readonly gravel: boolean
}

export type Fault = 'too-dry' | 'too-wet' | 'too-loose' | 'impossible'

/** Which of the demo's tests, by running count, go wrong, and how. */
const FAULTS: Readonly<Record<number, Fault>> = { 11: 'too-loose', 29: 'too-dry', 47: 'too-wet', 68: 'impossible', 83: 'too-loose', 104: 'too-dry', 127: 'too-dry', 149: 'too-loose', 166: 'too-wet', 187: 'too-dry' }
/** tests that no gauge is read at */
const DUG_EVERY = 9
const VERIFICATION_EVERY = 4
const JUDGEMENT_EVERY = 19

interface Failure {
  readonly testId: string
  readonly orderId: string
  readonly shift: Shift
  readonly fill: Fill
}

export interface Work {
  readonly plan: SitePlan
  readonly crew: Crew
  readonly chance: Chance
  readonly fillOf: (shift: Shift) => Fill
  readonly gauges: Pick<GaugeLog, 'main' | 'spare'>
  readonly apparatus: Pick<Apparatus, 'sheet'>
}

/** Plays shifts: fill in the morning, stakes and tests after noon, release before the day ends; failures wait for next morning. */
export class Foreman {
  private tests = 0
  private lots = 0

  constructor(private readonly work: Work) {}

  reading(fill: Fill, fault?: Fault): Reading {
    const { chance } = this.work
    const at = (rc: number, deviation: number): Reading => ({ dry: (fill.maximum * rc) / 100, moisture: fill.optimum + deviation })
    switch (fault) {
      case 'too-dry':
        return at(chance.uniform(95.6, 96.8), chance.uniform(-3.4, -2.6))
      case 'too-wet':
        return at(chance.uniform(95.3, 96), chance.uniform(3.3, 3.6))
      case 'too-loose':
        return at(chance.uniform(91.8, 93.6), chance.uniform(-1, 0.5))
      case 'impossible':
        return { dry: fill.zeroAirVoids(fill.optimum + 3.4) * 1.012, moisture: fill.optimum + 3.4 }
      case undefined: {
        const moisture = fill.optimum + chance.normal(0.05, 0.88)
        const dry = (fill.maximum * Math.max(95.1, chance.normal(97.1, 1))) / 100
        return { dry: Math.min(dry, fill.zeroAirVoids(moisture) * 0.985), moisture }
      }
    }
  }

  sheet(reading: Reading, gravel: boolean) {
    const { apparatus, chance, gauges } = this.work
    return this.tests % DUG_EVERY === 0 ? apparatus.sheet(reading, chance, { turn: this.tests / DUG_EVERY - 1, gravel }) : gaugeSheet(reading, gauges.main)
  }

  async place(shift: Shift, at: Date): Promise<string[]> {
    const { plan, crew, fillOf } = this.work
    const fill = fillOf(shift)
    const cells = await crew.readyFor(shift.lift, shift.panel.cells)
    if (cells.length === 0) return []
    return crew.place(plan, { ...this.where(shift), cells, materialId: fill.materialId, looseToCompacted: fill.looseToCompacted, machine: fill.machine, at })
  }

  where(shift: Shift): { zoneId: string; lift: number } {
    const zone = this.work.plan.zones[shift.panel.zone]
    if (!zone) throw new Error('The demo site has three zones')
    return { zoneId: zone.id, lift: shift.lift }
  }

  async testAt(shift: Shift, stake: Stake, at: Date, fault?: Fault): Promise<{ id: string; outcome: Outcome; orderId: string | null }> {
    this.tests++
    const fill = this.work.fillOf(shift)
    return this.work.crew.test({ ...this.where(shift), curveId: fill.curveId, place: stake, stakeId: stake.id, at, sheet: this.sheet(this.reading(fill, fault), fill.gravel) })
  }

  /** A whole shift on a past day; answers the failures that wait for the next morning. */
  async shift(shift: Shift, day: Day, hour: number, firstFault?: Fault): Promise<Failure[]> {
    const { plan, crew, fillOf } = this.work
    const failures: Failure[] = []
    for (const lotId of await this.place(shift, day.at(hour))) {
      this.lots++
      const stakes = await crew.draw(lotId, day.at(hour + 4.5))
      for (const [index, stake] of stakes.entries()) {
        const at = day.at(hour + 5 + 0.35 * index)
        const fault = index === 0 && firstFault ? firstFault : FAULTS[this.tests + 1]
        const saved = await this.testAt(shift, stake, at, fault)
        if (saved.orderId) failures.push({ testId: saved.id, orderId: saved.orderId, shift, fill: fillOf(shift) })
        if (saved.outcome === 'suspect') await this.rerun(shift, saved.id, stake, day.at(hour + 5.2 + 0.35 * index))
      }
      const [first] = stakes
      if (first && this.lots % VERIFICATION_EVERY === 0) await this.extraTest(shift, first, day.at(hour + 7), 'verification')
      if (first && this.lots % JUDGEMENT_EVERY === 0) await this.extraTest(shift, first, day.at(hour + 7.1), 'judgement')
    }
    await crew.release(plan, this.where(shift).zoneId, shift.lift, shift.panel.cells, day.at(hour + 8.2))
    return failures
  }

  private async rerun(shift: Shift, testId: string, stake: Stake, at: Date): Promise<void> {
    const fill = this.work.fillOf(shift)
    const reading = { dry: fill.maximum * 0.972, moisture: fill.optimum + 0.4 }
    await this.work.crew.test({ ...this.where(shift), curveId: fill.curveId, place: stake, at, sheet: sandConeSheet(reading, this.work.chance), follows: { testId, kind: 'rerun' }, remarks: 'Moisture count was read off the wrong line' })
  }

  private async extraTest(shift: Shift, near: Stake, at: Date, purpose: 'verification' | 'judgement'): Promise<void> {
    const { crew, gauges, fillOf } = this.work
    const fill = fillOf(shift)
    const place = { easting: near.easting + 6, northing: near.northing + 4 }
    await crew.test({ ...this.where(shift), curveId: fill.curveId, place, at, purpose, sheet: gaugeSheet(this.reading(fill), purpose === 'verification' ? gauges.spare : gauges.main) })
  }

  /** Next morning: the order is worked, reported and retested, and the ground released. */
  async rework({ testId, orderId, shift, fill }: Failure, day: Day): Promise<void> {
    const { plan, crew } = this.work
    await this.startOrder(orderId, day.at(7.2))
    await this.reportOrder(orderId, day.at(9))
    const order = await crew.order(orderId)
    for (const [index, point] of order.retestPoints.entries()) {
      const reading = { dry: fill.maximum * this.work.chance.uniform(0.965, 0.982), moisture: fill.optimum + 0.2 }
      await crew.test({
        ...this.where(shift),
        curveId: fill.curveId,
        place: point,
        at: day.at(9.6 + 0.3 * index),
        sheet: gaugeSheet(reading, this.work.gauges.main),
        follows: index === 0 ? { testId, kind: 'retest' } : null,
      })
    }
    await crew.release(plan, this.where(shift).zoneId, shift.lift, shift.panel.cells, day.at(10.8))
  }

  /** Lots of earlier days that still owe tests get their stakes, tests and release. */
  async catchUp(shifts: readonly Shift[], day: Day): Promise<void> {
    const { plan, crew } = this.work
    for (const { lotId, zoneId, lift, cells } of await crew.lotsShort()) {
      const shift = shifts.find((own) => own.lift === lift && own.panel.cells.some((cell) => cells.includes(cell)))
      if (!shift) continue
      for (const [index, stake] of (await crew.draw(lotId, day.at(9.5))).entries()) await this.testAt(shift, stake, day.at(9.8 + 0.2 * index))
      await crew.release(plan, zoneId, lift, cells, day.at(11))
    }
  }

  async startOrder(orderId: string, at: Date): Promise<void> {
    await this.work.crew.step(orderId, at, { id: this.work.crew.id(), kind: 'started', happenedAt: at.toISOString() })
  }

  async reportOrder(orderId: string, at: Date): Promise<void> {
    const { crew } = this.work
    const order = await crew.order(orderId)
    const waterLitres = Math.max(0, Math.round(order.waterLitres ?? 0))
    await crew.step(orderId, at, { id: crew.id(), kind: 'ready', happenedAt: at.toISOString(), passes: 6, waterLitres, depthUm: order.depthUm, remarks: '' })
  }
}
