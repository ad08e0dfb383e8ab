import { subDays } from 'date-fns'
import type { Deps } from '#api/deps.ts'
import { recordCalibration, voidCalibration } from '#api/features/calibrations/calibrations.service.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { CreateCalibration } from '#shared/schemas/calibration.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { Day } from '#seed/demo/demo-calendar.ts'
import type { DemoIds } from '#seed/demo/demo-people.ts'
import { createChance } from '#seed/demo/demo-random.ts'
import type { Chance } from '#seed/demo/demo-random.ts'
import { balloonSheet, cylinderSheet, sandConeSheet } from '#seed/demo/demo-sheets.ts'
import type { Reading } from '#seed/demo/demo-sheets.ts'

interface ApparatusOptions {
  readonly deps: Deps
  readonly siteId: string
  readonly people: DemoIds
  readonly setClock: (now: Date) => void
}

/** A mould of 1/30 ft³, 4,260 g empty, filled with test sand. */
const sandSheet = (...filled: number[]): CreateCalibration['sheet'] => ({ kind: 'sand-density', massUnit: 'g', volumeUnit: 'cm3', containerVolume: 944, container: 4_260, filled })

/** The methods of the tests that are not by gauge, in turn. */
const TURNS = ['cone', 'balloon', 'cone', 'cylinder'] as const

/** The technician's sand, cone, cylinder and balloon with their calibrations. Its chance is its own, so that no other figure of the demo hangs on it. */
export class Apparatus {
  private readonly chance = createChance('Apparatus of Alder Flats')
  private readonly sand = this.chance.id()
  private readonly cone = this.chance.id()
  private readonly cylinder = this.chance.id()
  private readonly balloon = this.chance.id()

  constructor(private readonly options: ApparatusOptions) {}

  private run<T>(at: Date, work: (write: SiteWrite) => Promise<T>): Promise<T> {
    const { deps, siteId, people, setClock } = this.options
    setClock(at)
    return writeToSite(deps, { siteId, userId: people.technician, verb: 'calibration.record' }, work)
  }

  private async record(at: Date, what: Pick<CreateCalibration, 'id' | 'apparatus' | 'sheet'> & Partial<CreateCalibration>): Promise<void> {
    await this.run(at, (write) => recordCalibration(write, { performedAt: at.toISOString(), validUntil: subDays(at, -365).toISOString(), remarks: '', ...what }))
  }

  /** Everything is calibrated on the first morning; the last bag of sand is out of date, one filling went wrong. */
  async open(day: Day): Promise<void> {
    const at = (minutes: number) => new Date(day.at(6.08).getTime() + minutes * 60_000)
    const before = (days: number) => subDays(at(0), days).toISOString()
    await this.record(at(0), { id: this.chance.id(), apparatus: 'Sand, batch 3', sheet: sandSheet(5_584, 5_586, 5_585), performedAt: before(160), validUntil: before(4), remarks: 'From the last site, used up' })
    const knocked = this.chance.id()
    await this.record(at(1), { id: knocked, apparatus: 'Sand, batch 4', sheet: sandSheet(5_598, 5_601, 5_651) })
    await this.run(at(2), (write) => voidCalibration(write, knocked, 'The mould was knocked while it was filled'))
    await this.record(at(3), { id: this.sand, apparatus: 'Sand, batch 4', sheet: sandSheet(5_598, 5_599, 5_599) })
    await this.record(at(4), { id: this.cone, apparatus: 'Cone 2', sheet: { kind: 'cone', massUnit: 'g', trials: [{ before: 7_420, after: 5_872 }, { before: 7_405, after: 5_858 }, { before: 7_411, after: 5_862 }] } })
    await this.record(at(5), { id: this.cylinder, apparatus: 'Cylinder 7', sheet: { kind: 'cylinder', lengthUnit: 'in', diameters: [4, 4.002, 3.998], heights: [4.584, 4.585, 4.583] } })
    const trials = [{ known: 1_416, before: 212, after: 1_631 }, { known: 2_124, before: 208, after: 2_337 }, { known: 2_832, before: 215, after: 3_052 }]
    await this.record(at(6), { id: this.balloon, apparatus: 'Balloon B-1', sheet: { kind: 'balloon', volumeUnit: 'cm3', trials }, remarks: 'Against three moulds' })
  }

  /** The sheet of the `turn`-th test that is not by gauge; no cylinder is driven into gravel. */
  sheet(reading: Reading, chance: Chance, { turn, gravel }: { readonly turn: number; readonly gravel: boolean }): CreateTest['sheet'] {
    const method = TURNS[turn % TURNS.length]
    if (method === 'balloon') return balloonSheet(reading, chance, [this.balloon])
    if (method === 'cylinder' && !gravel) return cylinderSheet(reading, chance, [this.cylinder])
    return sandConeSheet(reading, chance, [this.sand, this.cone])
  }
}
