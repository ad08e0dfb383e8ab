import { subDays } from 'date-fns'
import type { Deps } from '#api/deps.ts'
import { recordCorrection, recordCount, voidCount } from '#api/features/gauges/gauge-records.service.ts'
import { createGauge } from '#api/features/gauges/gauges.service.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { Day } from '#seed/demo/demo-calendar.ts'
import type { DemoIds } from '#seed/demo/demo-people.ts'
import { createChance } from '#seed/demo/demo-random.ts'

interface GaugeLogOptions {
  readonly deps: Deps
  readonly siteId: string
  readonly people: DemoIds
  readonly setClock: (now: Date) => void
}

interface Block {
  readonly serial: string
  readonly density: number
  readonly moisture: number
}

const MAIN: Block = { serial: 'G-41', density: 2_868, moisture: 643 }
const SPARE: Block = { serial: 'G-58', density: 2_411, moisture: 588 }
/** working days, counted from the first, on which something goes wrong */
const BAD_DAY = 24
const WRONG_LINE_DAY = 11

/** The technician's gauges: both counted every morning, the spare not yet today. Its chance is its own, so that no other figure of the demo hangs on it. */
export class GaugeLog {
  private readonly chance = createChance('Gauges of Alder Flats')
  /** the technician's daily gauge */
  readonly main = this.chance.id()
  /** what the owner's checks are read with */
  readonly spare = this.chance.id()

  constructor(private readonly options: GaugeLogOptions) {}

  private run<T>(at: Date, work: (write: SiteWrite) => Promise<T>): Promise<T> {
    const { deps, siteId, people, setClock } = this.options
    setClock(at)
    return writeToSite(deps, { siteId, userId: people.technician, verb: 'gauge.record' }, work)
  }

  /** Both gauges into the register, calibrated some weeks before. */
  async open(day: Day): Promise<void> {
    const at = day.at(6.05)
    const daysBefore = (days: number) => subDays(at, days).toISOString().slice(0, 10)
    for (const [id, { serial, density, moisture }] of [[this.main, MAIN], [this.spare, SPARE]] as const) {
      const calibration = { id: this.chance.id(), calibratedOn: daysBefore(26), dueOn: daysBefore(26 - 365), density, moisture }
      await this.run(at, (write) => createGauge(write, { id, serial, model: 'Surface moisture-density gauge, 12 in rod', leakTestedOn: daysBefore(48), calibration }))
    }
  }

  /** The counts of a morning, the source a little weaker every day. */
  async countAll(day: Day, index: number): Promise<void> {
    if (index === BAD_DAY) await this.count(this.main, MAIN, day.at(6.5), { index, off: 1.014, remarks: 'Block on the tailgate' })
    if (index === WRONG_LINE_DAY) {
      const id = await this.count(this.main, MAIN, day.at(6.5), { index, off: SPARE.density / MAIN.density, remarks: '' })
      await this.run(day.at(6.55), (write) => voidCount(write, this.main, id, 'Figures of the other gauge'))
    }
    await this.count(this.main, MAIN, day.at(6.7), { index, off: 1, remarks: index === BAD_DAY ? 'Again, block on the ground' : '' })
    await this.count(this.spare, SPARE, day.at(6.9), { index, off: 1, remarks: '' })
  }

  /** Today the spare still waits for its count. */
  async today(day: Day, index: number): Promise<void> {
    await this.count(this.main, MAIN, day.at(7.05), { index, off: 1, remarks: '' })
  }

  /** In the afternoon the daily gauge gets a moisture correction. */
  async correct(day: Day, materialId: string): Promise<void> {
    const pairs = [{ oven: 12.1, gauge: 11.6 }, { oven: 13.4, gauge: 12.9 }, { oven: 11.2, gauge: 10.8 }, { oven: 12.7, gauge: 12.1 }]
    const at = day.at(15.9)
    await this.run(at, (write) => recordCorrection(write, this.main, { id: this.chance.id(), materialId, pairs, inForceFrom: at.toISOString(), remarks: 'Four places of this week, oven overnight' }))
  }

  private async count(gaugeId: string, block: Block, at: Date, { index, off, remarks }: { index: number; off: number; remarks: string }): Promise<string> {
    const id = this.chance.id()
    const density = Math.round(block.density * off * (1 - index * 0.0002) * this.chance.normal(1, 0.0016))
    const moisture = Math.round(block.moisture * this.chance.normal(1, 0.0045))
    await this.run(at, (write) => recordCount(write, gaugeId, { id, countedAt: at.toISOString(), density, moisture, stability: null, remarks }))
    return id
  }
}
