import { useQuery } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { useFormContext, useWatch } from 'react-hook-form'
import type { Gauge } from '#shared/schemas/gauge.ts'
import { CountDialog } from '#web/components/gauge/count-dialog.tsx'
import { GaugeState } from '#web/components/gauge/gauge-state.tsx'
import { countText, GAUGE_STATE_WORDS } from '#web/components/gauge/gauge-words.ts'
import { Button } from '#web/components/ui/button.tsx'
import { SelectField } from '#web/components/ui/text-fields.tsx'
import { gaugeQueries } from '#web/data/gauge/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'

/** The register as it stood when the test was sampled, and the gauge the sheet names. */
export function useChosenGauge(): { readonly gauges: readonly Gauge[] | undefined; readonly gauge: Gauge | undefined } {
  const { site } = useSite()
  const { assessment } = useRecord()
  const { control } = useFormContext<TestForm>()
  const chosen = useWatch({ control, name: 'gauge.gaugeId' })
  const { data } = useQuery(gaugeQueries.list(site.id, assessment.sampledAt))
  return { gauges: data, gauge: data?.find((each) => each.id === chosen) }
}

/** Which gauge was read; how it stands on that day, and one tap to its count. Nothing where the site has no register. */
export function GaugeChoice() {
  const { register, setValue, getValues } = useFormContext<TestForm>()
  const { problemAt } = useRecord()
  const { gauges, gauge } = useChosenGauge()
  const usable = gauges?.filter((each) => each.outage === null)
  const only = usable?.length === 1 ? usable[0]?.id : undefined

  useEffect(() => {
    if (gauges === undefined) return
    const chosen = getValues('gauge.gaugeId')
    if (gauges.some((each) => each.id === chosen)) return
    // one that a draft or a habit brought from another site is let go
    if (chosen !== '' || only !== undefined) setValue('gauge.gaugeId', only ?? '')
  }, [gauges, only, getValues, setValue])

  if (gauges === undefined || gauges.length === 0) return null
  return (
    <div className="mb-3 grid items-start gap-x-[14px] gap-y-2 sm:grid-cols-[minmax(0,1fr)_minmax(0,2fr)]">
      <SelectField label="Gauge no." error={problemAt('gauge.gaugeId')} {...register('gauge.gaugeId')}>
        <option value="">Choose a gauge</option>
        {gauges.map((each) => (
          <option key={each.id} value={each.id}>
            {each.serial}
          </option>
        ))}
      </SelectField>
      {gauge !== undefined && <GaugeOnDay key={gauge.id} gauge={gauge} />}
    </div>
  )
}

function GaugeOnDay({ gauge }: { gauge: Gauge }) {
  const { can, units } = useSite()
  const { assessment } = useRecord()
  const [counting, setCounting] = useState(false)
  const { check } = gauge
  const { count } = check
  const counts = count === null ? '' : ` Density ${countText(count.density)}, moisture ${countText(count.moisture)}, at ${units.time(count.countedAt)}.`
  const mayCount = can('gauge.record') && (check.state === 'not-counted' || check.state === 'count-bad')
  return (
    <div role="status" aria-label="Gauge check" className="min-w-0 border-l-[5px] border-rule-2 bg-film px-3 pt-[9px] pb-[7px]">
      <GaugeState state={check.state} words={GAUGE_STATE_WORDS[check.state]} /> <span>{check.state === 'good' ? counts : `${check.message} ${check.state === 'count-bad' ? '' : counts}`}</span>
      {check.state !== 'good' && <span className="block text-small text-ink-2">The test can be saved; it releases no ground until this is put right.</span>}
      {mayCount && (
        <Button className="mt-2 pointer-coarse:min-h-12 max-sm:w-full" onClick={() => setCounting(true)}>
          {check.state === 'count-bad' ? 'Count again' : 'Enter the day’s count'}
        </Button>
      )}
      {counting && assessment.sampledAt !== null && <CountDialog gauge={gauge} at={assessment.sampledAt} onClose={() => setCounting(false)} />}
    </div>
  )
}
