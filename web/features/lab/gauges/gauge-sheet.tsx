import { useQuery } from '@tanstack/react-query'
import { dayWords } from '#shared/domain/gauge-check.ts'
import type { Gauge, GaugeCorrection, JudgedCountView } from '#shared/schemas/gauge.ts'
import { GaugeCaution } from '#web/components/gauge/gauge-caution.tsx'
import { GaugeState } from '#web/components/gauge/gauge-state.tsx'
import { GAUGE_STATE_WORDS, referenceWords } from '#web/components/gauge/gauge-words.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { FactsRow } from '#web/components/ui/figure.tsx'
import { Menu, MenuItem } from '#web/components/ui/menu.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { gaugeQueries } from '#web/data/gauge/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CountLog } from './count-log.tsx'
import { DriftChart } from './drift-chart.tsx'
import { CorrectionsTable, GaugeHistory } from './gauge-history.tsx'

/** What can be done to a gauge, each in a dialog of the page. */
export type GaugeAct =
  | { readonly kind: 'count' | 'calibration' | 'edit' | 'take-out' | 'put-back' | 'correction' }
  | { readonly kind: 'void'; readonly count: JudgedCountView }
  | { readonly kind: 'withdraw'; readonly correction: GaugeCorrection }

function Acts({ gauge, onAct }: { gauge: Gauge; onAct: (act: GaugeAct) => void }) {
  return (
    <div className="flex flex-wrap gap-2">
      {gauge.outage === null ? (
        <Button kind="primary" className="pointer-coarse:min-h-12" onClick={() => onAct({ kind: 'count' })}>
          {gauge.check.count === null ? 'Enter today’s count' : 'Count again'}
        </Button>
      ) : (
        <Button kind="primary" className="pointer-coarse:min-h-12" onClick={() => onAct({ kind: 'put-back' })}>
          Put back in service
        </Button>
      )}
      <Menu trigger={<Button className="pointer-coarse:min-h-12">More</Button>}>
        <MenuItem onSelect={() => onAct({ kind: 'correction' })}>New moisture correction</MenuItem>
        <MenuItem onSelect={() => onAct({ kind: 'calibration' })}>New calibration</MenuItem>
        <MenuItem onSelect={() => onAct({ kind: 'edit' })}>Leak test and model</MenuItem>
        {gauge.outage === null ? <MenuItem onSelect={() => onAct({ kind: 'take-out' })}>Take out of service</MenuItem> : <MenuItem onSelect={() => onAct({ kind: 'count' })}>Enter a count</MenuItem>}
      </Menu>
    </div>
  )
}

/** One gauge: how it stands, the drift of its counts, its log. */
export function GaugeSheet({ gauge, onAct }: { gauge: Gauge; onAct: (act: GaugeAct) => void }) {
  const { site, can } = useSite()
  const { data, error, refetch } = useQuery(gaugeQueries.detail(site.id, gauge.id))
  const records = can('gauge.record')
  const { calibration, check } = gauge
  return (
    <section aria-label={`Gauge ${gauge.serial}`}>
      <div className="flex flex-wrap items-start justify-between gap-3">
        <div>
          <h2 className="m-0 text-question font-extrabold">{gauge.serial}</h2>
          <p className="m-0 mt-1 text-ink-2">{gauge.model}</p>
        </div>
        {records && <Acts gauge={gauge} onAct={onAct} />}
      </div>
      <p className="mt-3 mb-0">
        <GaugeState state={check.state} words={GAUGE_STATE_WORDS[check.state]} /> {check.message} {check.state !== 'good' && 'Results read with it that day hold their release.'}
      </p>
      <FactsRow
        className="mt-4"
        facts={[
          { label: 'Calibrated', value: calibration === null ? '–' : dayWords(calibration.calibratedOn), unit: calibration?.calibratedOn.slice(0, 4) ?? '' },
          { label: 'Due', value: calibration === null || calibration.dueOn === null ? 'not set' : dayWords(calibration.dueOn), unit: calibration?.dueOn?.slice(0, 4) ?? '', tone: check.state === 'overdue' ? 'bad' : undefined },
          { label: 'Leak test', value: gauge.leakTestedOn === null ? 'not set' : dayWords(gauge.leakTestedOn), unit: gauge.leakTestedOn?.slice(0, 4) ?? '' },
        ]}
      />
      <p className="mt-3 mb-4 text-ink-2">{check.reference === null ? '' : 'A count today is '}{referenceWords(check.reference)}</p>
      <GaugeCaution />
      {error !== null && (
        <Banner tone="bad" className="mt-4" title="The log of this gauge could not be read." action={<button type="button" onClick={() => void refetch()}>Try again</button>}>
          {error.message}
        </Banner>
      )}
      {data === undefined ? (
        error === null && (
          <div className="mt-6">
            <Skeleton label="The log is on its way" lines={[90, 90, 70]} />
          </div>
        )
      ) : (
        <div className="mt-6 grid grid-cols-[minmax(0,1fr)] gap-7">
          {data.counts.some((count) => count.reference !== null) && (
            <section>
              <SectionHead level={3} aside="density within 1 %, moisture within 2 %">
                Drift
              </SectionHead>
              <DriftChart gauge={data} />
            </section>
          )}
          <section>
            <SectionHead level={3} aside="of a day, the last that is not void counts">
              Standard counts
            </SectionHead>
            <CountLog gauge={data} onVoid={records ? (count) => onAct({ kind: 'void', count }) : undefined} />
          </section>
          <section>
            <SectionHead level={3} aside="gauge against oven, mean of the pairs">
              Moisture corrections
            </SectionHead>
            <CorrectionsTable gauge={data} onWithdraw={records ? (correction) => onAct({ kind: 'withdraw', correction }) : undefined} />
          </section>
          <section>
            <SectionHead level={3}>Calibrations and service</SectionHead>
            <GaugeHistory gauge={data} />
          </section>
        </div>
      )}
    </section>
  )
}
