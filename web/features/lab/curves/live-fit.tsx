import { useMemo } from 'react'
import type { AlternativeFit, MaximumPair } from '#shared/domain/reference-curve.ts'
import { fitReferenceCurve, sampleCurve } from '#shared/domain/reference-curve.ts'
import type { CreateCurve } from '#shared/schemas/lab.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CurvePlot } from './curve-plot.tsx'
import { FitsTable, FitWarnings } from './fits-table.tsx'

const pairOf = (fit: AlternativeFit): MaximumPair | null => (fit.ok ? fit : null)

/** The fit of what is typed so far: its pair, the other fits', and what stands against it. */
export function LiveFit({ points, gs, gsMeasured, reported }: { points: CreateCurve['points']; gs: number; gsMeasured: boolean; reported: CreateCurve['reported'] }) {
  const { site, units } = useSite()
  const fit = useMemo(() => fitReferenceCurve({ points, gs, gsMeasured, waterDensity: site.waterDensity }), [points, gs, gsMeasured, site.waterDensity])
  const drawn = useMemo(() => {
    const moistures = new Set(points.map((point) => point.moisture))
    return moistures.size === points.length ? sampleCurve(points, 81) : []
  }, [points])
  const pair = fit.ok ? fit.spline : null
  return (
    <div aria-live="polite">
      <CurvePlot
        label={pair === null ? `${points.length} points, no reference yet` : `${points.length} points, ${units.density(pair.maxDryDensity)} at ${units.percent(pair.optimumMoisture)}`}
        points={points}
        drawn={drawn}
        gs={Number.isFinite(gs) && gs > 1 ? gs : 2.7}
        pair={pair}
        reported={reported}
      />
      {fit.ok ? (
        <>
          <FitsTable fits={{ spline: fit.spline, quadratic: pairOf(fit.quadratic), cubic: pairOf(fit.cubic) }} reported={reported} inUse={reported === null ? 'spline' : 'reported'} />
          <FitWarnings warnings={fit.warnings} />
        </>
      ) : (
        <p className={`mt-3 mb-0 font-medium ${points.length < 4 ? 'text-ink-2' : 'text-bad'}`}>{fit.reason.message}</p>
      )}
    </div>
  )
}
