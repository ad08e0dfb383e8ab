import { useFormContext, useWatch } from 'react-hook-form'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { AcceptanceWindow } from '#web/components/drawing/acceptance-window.tsx'
import { ErrorBoundary } from '#web/components/ui/error-boundary.tsx'
import { groundOf, markOf } from '#web/features/tests/outcome-words.ts'
import { VerdictFacts } from '#web/features/tests/verdict-facts.tsx'
import { VerdictNote } from '#web/features/tests/verdict-note.tsx'
import { windowPlot } from '#web/features/tests/window-plot.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { convertDensity } from '#shared/units/density.ts'
import { waterWords } from './consequence-words.ts'
import { useConsequenceWords } from './consequence.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'
import type { Previewed } from './use-preview.ts'

/** What is still to be typed before there is a verdict. */
function waitingWords({ problems }: ReturnType<typeof useRecord>['assessment']): string {
  const stopping = [...problems.values()].find((problem) => !problem.missing)
  if (stopping !== undefined) return stopping.message
  const next = [...problems.values()][0]
  return next === undefined ? 'The readings cannot be judged yet.' : next.message
}

function useHeadline(): { headline: string; waiting: boolean } {
  const { assessment } = useRecord()
  return assessment.verdict === null ? { headline: 'No verdict yet', waiting: true } : { headline: assessment.verdict.headline, waiting: false }
}

/** The verdict in one line, held in sight over the form on narrow screens. */
export function VerdictStrip({ previewed }: { previewed: Previewed }) {
  const { assessment } = useRecord()
  const { control } = useFormContext<TestForm>()
  const purpose = useWatch({ control, name: 'purpose' })
  const { headline, waiting } = useHeadline()
  const { verdict, lift } = assessment
  const words = useConsequenceWords({ previewed, verdict, purpose, lift })
  return (
    <div role="status" className="sticky top-0 z-10 flex items-center gap-3 border-b-2 border-ink bg-sheet px-4 py-2 lg:hidden">
      <StateSwatch state={verdict === null ? 'not-placed' : groundOf(verdict)} near={verdict?.outcome === 'pass' && verdict.near} size={36} />
      <span className="min-w-0 leading-[1.25]">
        <b className="block truncate text-[17px] font-extrabold">{headline}</b>
        <span className="line-clamp-2 text-small text-ink-2">{waiting ? waitingWords(assessment) : words}</span>
      </span>
    </div>
  )
}

/** The verdict while typing: swatch, headline, what saving does, the plot, the figures, the distance to the limits. */
export function VerdictSide({ previewed }: { previewed: Previewed }) {
  const context = useSite()
  const { units, site } = context
  const { assessment } = useRecord()
  const { control } = useFormContext<TestForm>()
  const purpose = useWatch({ control, name: 'purpose' })
  const { headline, waiting } = useHeadline()
  const { verdict, reduced, curve, place, lift } = assessment
  const words = useConsequenceWords({ previewed, verdict, purpose, lift })
  const water = verdict === null ? null : waterWords(verdict, previewed.state === 'known' ? previewed.preview : undefined, context)
  const unit = units.system === 'us' ? 'pcf' : 'kN/m3'
  return (
    <>
      <div className="grid grid-cols-[64px_1fr] items-center gap-4 pb-4" aria-live="polite">
        <StateSwatch state={verdict === null ? 'not-placed' : groundOf(verdict)} near={verdict?.outcome === 'pass' && verdict.near} size={64} />
        <div>
          <h2 className="m-0 text-verdict font-extrabold tracking-[-0.01em]">{headline}</h2>
          <p className="mt-1 mb-0 text-ink-2">{waiting ? waitingWords(assessment) : words}</p>
          {waiting && previewed.state === 'known' && words !== '' && <p className="mt-1 mb-0 text-small text-ink-2">{words}</p>}
        </div>
      </div>
      {curve?.pair && place ? (
        <ErrorBoundary what="The plot">
          <AcceptanceWindow
            {...windowPlot({
              reference: verdict ? { maxDryDensity: verdict.maxDryDensityUsed, optimumMoisture: verdict.optimumUsed, gs: verdict.gsUsed } : { ...curve.pair, gs: curve.gs },
              curveMaximum: curve.pair.maxDryDensity,
              criteria: place.zone.specification.criteria,
              waterDensity: site.waterDensity,
              curve,
              units,
            })}
            label={reduced === null ? `The window of ${curve.code}; no point yet.` : `${headline}: ${units.percent(reduced.moisture)} moisture, ${units.density(reduced.dryDensity)} dry, against ${curve.code}.`}
            tests={reduced === null || verdict === null ? [] : [{ id: 'typed', moisture: reduced.moisture, density: convertDensity(reduced.dryDensity, 'kg/m3', unit), outcome: markOf(verdict), verification: purpose === 'verification', current: true }]}
          />
        </ErrorBoundary>
      ) : (
        <div className="grid min-h-[260px] place-items-center border border-dashed border-rule-2 px-6 text-center text-ink-2">The plot is drawn once place and curve are chosen.</div>
      )}
      <div className="mt-[6px]">
        <VerdictFacts facts={reduced && verdict ? { dryDensity: reduced.dryDensity, moisture: reduced.moisture, rc: verdict.rc, saturation: verdict.saturation, reasons: verdict.reasons } : null} units={units} />
      </div>
      {verdict !== null && (
        <VerdictNote verdict={{ ...verdict, reasons: [...verdict.reasons], suspicions: [...verdict.suspicions], advice: [...verdict.advice] }}>{water !== null && <p className="m-0">{water}</p>}</VerdictNote>
      )}
    </>
  )
}
