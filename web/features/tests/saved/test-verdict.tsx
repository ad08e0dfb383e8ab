import { useQuery } from '@tanstack/react-query'
import { convertDensity } from '#shared/units/density.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { AcceptanceWindow } from '#web/components/drawing/acceptance-window.tsx'
import { ErrorBoundary } from '#web/components/ui/error-boundary.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { curveQueries } from '#web/data/curve/queries.ts'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { groundOf, markOf } from '#web/features/tests/outcome-words.ts'
import { VerdictFacts } from '#web/features/tests/verdict-facts.tsx'
import { VerdictNote } from '#web/features/tests/verdict-note.tsx'
import { windowPlot } from '#web/features/tests/window-plot.ts'

/** The verdict as it was frozen, with its plot against the curve and limits it was judged by. */
export function TestVerdict({ test }: { test: TestDetail }) {
  const { site, units, label } = useSite()
  const { verdict } = test
  const curve = useQuery(curveQueries.detail(site.id, test.curveId)).data
  const unit = units.system === 'us' ? 'pcf' : 'kN/m3'
  const off = test.voided || test.superseded
  return (
    <>
      <div className="grid grid-cols-[64px_1fr_auto] items-center gap-4 pb-4">
        <StateSwatch state={off ? 'not-placed' : groundOf(test)} near={!off && test.outcome === 'pass' && test.near} size={64} />
        <div>
          <h2 className={classNames('m-0 text-verdict font-extrabold tracking-[-0.01em]', test.voided && 'line-through')}>{test.headline}</h2>
          <p className="mt-1 mb-0 text-ink-2">
            Cell {label(test.cell)}, lift {test.lift}, against {test.curveCode}
          </p>
        </div>
        <TestMark outcome={markOf(test)} verification={test.purpose === 'verification'} size={44} className={classNames(off && 'opacity-40')} />
      </div>
      <ErrorBoundary what="The plot">
        <AcceptanceWindow
          {...windowPlot({
            reference: { maxDryDensity: verdict.maxDryDensityUsed, optimumMoisture: verdict.optimumUsed, gs: verdict.gsUsed },
            curveMaximum: verdict.against.curve.maxDryDensity,
            criteria: verdict.against.criteria,
            waterDensity: verdict.against.waterDensity,
            curve,
            units,
          })}
          label={`${test.headline}: ${units.percent(test.moisture)} moisture, ${units.density(test.dryDensity)} dry, against ${test.curveCode}.`}
          tests={[{ id: test.id, moisture: test.moisture, density: convertDensity(test.dryDensity, 'kg/m3', unit), outcome: markOf(test), verification: test.purpose === 'verification', current: true }]}
        />
      </ErrorBoundary>
      <div className="mt-[6px]">
        <VerdictFacts facts={{ dryDensity: test.dryDensity, moisture: test.moisture, rc: test.rc, saturation: verdict.saturation, reasons: verdict.reasons }} units={units} />
      </div>
      <VerdictNote verdict={verdict} />
      {test.flags.length > 0 && (
        <ul className="mt-[14px] mb-0 list-none border-l-4 border-warn p-0 pl-[14px] leading-[1.45]">
          {test.flags.map(({ code, message }) => (
            <li key={code}>
              <b className="font-semibold text-warn">Flagged.</b> {message}
            </li>
          ))}
        </ul>
      )}
    </>
  )
}
