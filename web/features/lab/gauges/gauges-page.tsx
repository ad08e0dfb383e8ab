import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import { dayWords } from '#shared/domain/gauge-check.ts'
import type { Gauge } from '#shared/schemas/gauge.ts'
import { CountDialog } from '#web/components/gauge/count-dialog.tsx'
import { registerWords } from '#web/components/gauge/gauge-words.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { gaugeQueries } from '#web/data/gauge/queries.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { LabFrame } from '#web/features/lab/lab-frame.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { CorrectionDialog } from './correction-dialog.tsx'
import { GaugeSheet, type GaugeAct } from './gauge-sheet.tsx'
import { GaugesTable } from './gauges-table.tsx'
import { CalibrationDialog, EditGaugeDialog, NewGaugeDialog } from './register-dialogs.tsx'
import { ServiceDialog, WithReasonDialog } from './service-dialog.tsx'

/** The dialog of an act on a gauge. */
function ActDialog({ gauge, act, onClose }: { gauge: Gauge; act: GaugeAct; onClose: () => void }) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  switch (act.kind) {
    case 'count':
      return <CountDialog gauge={gauge} at={now()} onClose={onClose} />
    case 'calibration':
      return <CalibrationDialog gauge={gauge} onClose={onClose} />
    case 'edit':
      return <EditGaugeDialog gauge={gauge} onClose={onClose} />
    case 'take-out':
    case 'put-back':
      return <ServiceDialog gauge={gauge} back={act.kind === 'put-back'} onClose={onClose} />
    case 'correction':
      return <CorrectionDialog gauge={gauge} onClose={onClose} />
    case 'void':
      return <WithReasonDialog gauge={gauge} part={{ kind: 'count', id: act.count.id, name: `${dayWords(act.count.day)}, ${units.time(act.count.countedAt)}` }} onClose={onClose} />
    case 'withdraw':
      return <WithReasonDialog gauge={gauge} part={{ kind: 'correction', id: act.correction.id, name: act.correction.materialName }} onClose={onClose} />
  }
}

/** The register of nuclear gauges: whether each is good today, its log and its corrections. */
export function GaugesPage() {
  const { site, can } = useSite()
  const [search, setSearch] = useSearchParams()
  const [asked, setAsked] = useState<{ readonly gauge: Gauge; readonly act: GaugeAct } | null>(null)
  const [adding, setAdding] = useState(false)
  const { data, error, refetch } = useQuery(gaugeQueries.list(site.id))
  const choose = (id: string) => setSearch({ gauge: id }, { replace: true })
  const chosen = data?.find((gauge) => gauge.id === search.get('gauge')) ?? data?.[0]
  const records = can('gauge.record')
  const add = records && <Button className="pointer-coarse:min-h-11" kind={data?.length === 0 ? 'primary' : 'plain'} onClick={() => setAdding(true)}>New gauge</Button>
  return (
    <LabFrame summary={data === undefined ? undefined : data.length === 0 ? 'Nuclear gauges and their standard counts' : registerWords(data)} actions={data !== undefined && data.length > 0 && add} failed={error} onRetry={() => void refetch()}>
      {data === undefined ? (
        error === null && (
          <div className="px-4 sm:px-[26px]">
            <Skeleton label="The register is on its way" lines={[60, 72, 40]} />
          </div>
        )
      ) : chosen === undefined ? (
        <div className="max-w-[640px] px-4 sm:px-[26px]">
          <EmptyState title="No gauge yet" action={add || undefined}>
            Once a gauge stands here, tests read with it name it, and its standard count of the day holds or frees their release.
          </EmptyState>
        </div>
      ) : (
        <div className="grid gap-x-10 gap-y-8 px-4 pb-10 sm:px-[26px] xl:grid-cols-[minmax(0,1fr)_minmax(440px,600px)]">
          <section className="min-w-0">
            <SectionHead aside="the site’s working day">Gauges</SectionHead>
            <GaugesTable gauges={data} chosen={chosen.id} onChoose={choose} onCount={records ? (gauge) => setAsked({ gauge, act: { kind: 'count' } }) : undefined} />
          </section>
          <div className="min-w-0 xl:border-l xl:border-rule-2 xl:pl-10">
            <GaugeSheet key={chosen.id} gauge={chosen} onAct={(act) => setAsked({ gauge: chosen, act })} />
          </div>
        </div>
      )}
      {adding && (
        <NewGaugeDialog
          onClose={() => setAdding(false)}
          onSaved={(gauge) => {
            setAdding(false)
            choose(gauge.id)
          }}
        />
      )}
      {asked !== null && <ActDialog gauge={asked.gauge} act={asked.act} onClose={() => setAsked(null)} />}
    </LabFrame>
  )
}
