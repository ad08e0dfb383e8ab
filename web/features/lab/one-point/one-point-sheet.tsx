import { useState } from 'react'
import { Link } from 'react-router-dom'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { THIN_SPACE } from '#shared/units/format.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import type { OnePointCheck } from '#shared/schemas/one-point.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { FactsRow } from '#web/components/ui/figure.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { OnePointFinding } from './one-point-finding.tsx'
import { VoidOnePointDialog } from './void-one-point-dialog.tsx'

const VOLUME_LABEL = { ft3: 'ft³', cm3: 'cm³', m3: 'm³' } as const

const reading = (value: number, unit: string): string => `${value.toLocaleString('en-US', { maximumFractionDigits: 10 })}${THIN_SPACE}${unit}`

/** The readings as they were recorded. */
function readings({ sheet }: OnePointCheck): string {
  const { moisture } = sheet
  const specimen =
    sheet.kind === 'mould'
      ? `Mould and soil ${reading(sheet.mouldAndSoil, sheet.massUnit)}, mould ${reading(sheet.mould, sheet.massUnit)}, ${reading(sheet.mouldVolume, VOLUME_LABEL[sheet.volumeUnit])}`
      : `Wet density ${reading(sheet.wetDensity, DENSITY_UNIT_LABEL[sheet.densityUnit])}`
  switch (moisture.method) {
    case 'oven':
    case 'microwave':
      return `${specimen}. Moisture by ${moisture.method}: wet ${reading(moisture.wetAndTin, moisture.massUnit)}, dry ${reading(moisture.dryAndTin, moisture.massUnit)}, tin ${reading(moisture.tin, moisture.massUnit)}.`
    case 'carbide':
      return `${specimen}. Carbide dial ${reading(moisture.readingPercent, '%')} of wet mass.`
    case 'stated':
      return `${specimen}. Moisture stated, ${reading(moisture.percent, '%')}.`
  }
}

/** One recorded check: its readings, and what they came to that day. */
export function OnePointSheet({ check, curves }: { check: OnePointCheck; curves: readonly Curve[] }) {
  const { site, can, units } = useSite()
  const [voiding, setVoiding] = useState(false)
  const { fit } = check.result
  return (
    <section aria-label={`Check ${check.number}`}>
      <div className="flex flex-wrap items-start justify-between gap-3">
        <div>
          <h2 className={`m-0 text-question font-extrabold ${check.void === null ? '' : 'line-through'}`}>{check.number}</h2>
          <p className="m-0 mt-1 text-ink-2">
            {check.materialName}, {check.method} {check.procedure}, {units.dateTime(check.sampledAt)}, by {check.recordedBy.name}
          </p>
        </div>
        {check.void === null && can('one-point.record') && (
          <Button kind="danger" className="pointer-coarse:min-h-11" onClick={() => setVoiding(true)}>
            Void with reason
          </Button>
        )}
      </div>
      {check.void !== null && (
        <Banner tone="bad" className="mt-3" title={`Void since ${units.dateTime(check.void.at)}, by ${check.void.by}.`}>
          {check.void.reason}
        </Banner>
      )}
      <FactsRow
        className="mt-4 grid-cols-2! sm:grid-cols-4!"
        facts={[
          { label: 'Dry', value: units.density(check.dryDensity) },
          { label: 'Moisture', value: units.percent(check.moisture) },
          { label: 'Max found', value: fit.ok ? units.density(fit.pair.maxDryDensity) : '–' },
          { label: 'Optimum found', value: fit.ok ? units.percent(fit.pair.optimumMoisture) : '–' },
        ]}
      />
      <p className="mt-3 mb-4 text-ink-2">
        {readings(check)}
        {check.test !== null && (
          <>
            {' '}
            Soil of{' '}
            <Link className="link-ink whitespace-nowrap" to={paths.test(site.id, check.test.id)}>
              {check.test.number}
            </Link>
            .
          </>
        )}
        {check.remarks !== '' && ` ${check.remarks}`}
      </p>
      <OnePointFinding result={check.result} point={check} curves={curves} />
      {voiding && <VoidOnePointDialog check={check} onClose={() => setVoiding(false)} />}
    </section>
  )
}
