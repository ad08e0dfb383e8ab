import { useMemo } from 'react'
import type { LabPoint } from '#shared/domain/curve-points.ts'
import type { AlternativeFit, CurveFit, MaximumPair } from '#shared/domain/reference-curve.ts'
import { fitReferenceCurve, sampleCurve } from '#shared/domain/reference-curve.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CurvePlot } from './curve-plot.tsx'
import { FitsTable, FitWarnings } from './fits-table.tsx'

const pairOf = (fit: AlternativeFit): MaximumPair | null => (fit.ok ? fit : null)

export type LiveCurve = { readonly points: readonly LabPoint[]; readonly gs: number; readonly reported: MaximumPair | null; readonly fit: CurveFit; readonly headline: string; readonly words: string; readonly wrong: boolean }

/** The fit of what is typed so far, and what to say of it. */
export function useLiveCurve(points: readonly LabPoint[], { gs, gsMeasured, reported }: { gs: number; gsMeasured: boolean; reported: MaximumPair | null }): LiveCurve {
  const { site, units } = useSite()
  const fit = useMemo(() => fitReferenceCurve({ points, gs, gsMeasured, waterDensity: site.waterDensity }), [points, gs, gsMeasured, site.waterDensity])
  const base = { points, gs, reported, fit }
  const waiting = points.length < 4 || !Number.isFinite(gs)
  if (!fit.ok) return { ...base, headline: waiting ? 'No maximum yet' : 'No reference', words: Number.isFinite(gs) ? fit.reason.message : `Enter the specific gravity of the solids. ${points.length} ${points.length === 1 ? 'specimen' : 'specimens'} so far.`, wrong: !waiting }
  const saturated = fit.peakSaturation === null ? '' : `, ${units.number(fit.peakSaturation, 0)} % saturated there`
  return { ...base, headline: `${units.density(fit.spline.maxDryDensity)} at ${units.percent(fit.spline.optimumMoisture)}`, words: `Smooth curve through ${points.length} specimens${saturated}.`, wrong: false }
}

/** The pair in one line, held in sight over the sheet on narrow screens. */
export function FitStrip({ live }: { live: LiveCurve }) {
  return (
    <div role="status" className="sticky top-0 z-10 border-b-2 border-ink bg-sheet px-4 py-2 sm:px-[26px] lg:hidden">
      <b className="block truncate text-[17px] leading-[1.25] font-extrabold">{live.headline}</b>
      <span className={`line-clamp-2 text-small leading-[1.25] ${live.wrong ? 'font-medium text-bad' : 'text-ink-2'}`}>{live.words}</span>
    </div>
  )
}

/** The fit while typing: the pair, the drawing, the other fits' pairs, and what stands against it. */
export function LiveFit({ live }: { live: LiveCurve }) {
  const { points, gs, reported, fit, headline, words, wrong } = live
  const drawn = useMemo(() => {
    const moistures = new Set(points.map((point) => point.moisture))
    return moistures.size === points.length ? sampleCurve(points, 81) : []
  }, [points])
  const pair = fit.ok ? fit.spline : null
  return (
    <>
      <div aria-live="polite" className="mb-4">
        <h2 className="m-0 text-verdict font-extrabold tracking-[-0.01em]">{headline}</h2>
        <p className={`mt-1 mb-0 ${wrong ? 'font-medium text-bad' : 'text-ink-2'}`}>{words}</p>
      </div>
      <CurvePlot label={`${points.length} points, ${pair === null ? 'no reference yet' : headline}`} points={points} drawn={drawn} gs={Number.isFinite(gs) && gs > 1 ? gs : null} pair={pair} reported={reported} ground="sheet" />
      {fit.ok && (
        <>
          <FitsTable fits={{ spline: fit.spline, quadratic: pairOf(fit.quadratic), cubic: pairOf(fit.cubic) }} gs={gs} reported={reported} inUse={reported === null ? 'spline' : 'reported'} />
          <FitWarnings warnings={fit.warnings} />
        </>
      )}
    </>
  )
}
