import type { EntityManager } from 'typeorm'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { loadGauges } from '#api/features/gauges/gauge-facts.queries.ts'
import { checkGauge, GAUGE_NOT_NAMED } from '#shared/domain/gauge-check.ts'
import { workDay } from '#shared/domain/lots.ts'
import type { TestGauge } from '#shared/schemas/gauge.ts'

/** What is asked about a test that was read with a gauge; `gaugeId` is null where it names none. */
export interface GaugeTest {
  readonly id: string
  readonly gaugeId: string | null
  readonly sampledAt: Date
}

/** Reads `1` for a test that was read with a gauge, its density or only its moisture; `t` is the test. */
export const USES_GAUGE = "(t.`method` = 'nuclear-gauge' OR JSON_VALUE(t.`sheet`, '$.moisture.method') = 'gauge')"

/** The gauge behind each of these gauge tests, as its counts, calibrations and times out of service stand now. */
export async function loadGaugeChecks(manager: EntityManager, siteId: string, tests: readonly GaugeTest[]): Promise<ReadonlyMap<string, TestGauge>> {
  const ids = [...new Set(tests.flatMap((test) => test.gaugeId ?? []))]
  const gauges = new Map((ids.length === 0 ? [] : await loadGauges(manager, siteId, ids)).map((loaded) => [loaded.gauge.id, loaded]))
  const site = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  // without a time out of service all tests of a day share one answer
  const ofDay = new Map<string, TestGauge>()
  return new Map(
    tests.map(({ id, gaugeId, sampledAt }): [string, TestGauge] => {
      const loaded = gaugeId === null ? undefined : gauges.get(gaugeId)
      if (!loaded) return [id, { gaugeId: null, serial: null, ...GAUGE_NOT_NAMED }]
      const { facts, gauge } = loaded
      const day = workDay(sampledAt.getTime(), site.timeZone, site.dayCutHour)
      const key = `${gauge.id}|${day}`
      const known = facts.outages.length === 0 ? ofDay.get(key) : undefined
      if (known) return [id, known]
      const { state, message } = checkGauge(facts, sampledAt.getTime(), day)
      const answer: TestGauge = { gaugeId: gauge.id, serial: gauge.serial, state, message }
      ofDay.set(key, answer)
      return [id, answer]
    }),
  )
}
