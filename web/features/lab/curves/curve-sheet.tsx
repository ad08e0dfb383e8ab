import { useState } from 'react'
import { saturation } from '#shared/domain/phase-relations.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { SubjectFiles } from '#web/components/files/subject-files.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { FactsRow } from '#web/components/ui/figure.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { ApproveDialog } from './approve-dialog.tsx'
import { CurvePlot } from './curve-plot.tsx'
import { CurveNotes } from './curve-notes.tsx'
import { CurveSuccession } from './curve-succession.tsx'
import { DraftActs } from './draft-acts.tsx'
import { EnteredSpecimens } from './entered-specimens.tsx'
import { FitsTable, FitWarnings } from './fits-table.tsx'
import { OversizePairs } from './oversize-pairs.tsx'
import { pairWords, sieveWords, STATUS_WORDS } from '#web/features/lab/lab-words.ts'

/** One reference curve: its points, the fit, the pair in force and how it came to be. */
export function CurveSheet({ curve }: { curve: Curve }) {
  const { can, site, units } = useSite()
  const [approving, setApproving] = useState(false)
  const { fit, reported, coarse } = curve
  const peak = curve.pair === null ? null : saturation(curve.pair.maxDryDensity, curve.pair.optimumMoisture, curve.gs, site.waterDensity)
  const saturated = peak?.ok ? peak.value : null
  return (
    <section aria-label={`Curve ${curve.code}`}>
      <div className="flex flex-wrap items-start justify-between gap-3">
        <div>
          <h2 className="m-0 text-question font-extrabold">{curve.code}</h2>
          <p className="m-0 mt-1 text-ink-2">
            {curve.materialName}, {curve.method} method {curve.procedure}, sampled {units.fullDate(curve.sampledAt)}
          </p>
        </div>
        <div className="flex flex-wrap gap-2">
          <DraftActs curve={curve} />
          {curve.status === 'draft' && can('curve.approve') && (
            <Button kind="primary" className="pointer-coarse:min-h-11" onClick={() => setApproving(true)}>
              Approve
            </Button>
          )}
        </div>
      </div>
      <FactsRow
        className="mt-4"
        facts={[
          { label: 'Max dry', value: curve.pair === null ? '–' : units.density(curve.pair.maxDryDensity) },
          { label: 'Optimum', value: curve.pair === null ? '–' : units.percent(curve.pair.optimumMoisture) },
          { label: 'Saturation', value: saturated === null ? '–' : `${units.number(saturated, 0)} %` },
          { label: curve.gsMeasured ? 'Gs, measured' : 'Gs, assumed', value: String(curve.gs) },
        ]}
      />
      <p className="mt-3 mb-0">
        {STATUS_WORDS[curve.status === 'superseded' ? 'approved' : curve.status]}
        {curve.approvedBy !== null && curve.approvedAt !== null && ` by ${curve.approvedBy} on ${units.fullDate(curve.approvedAt)}`}. Recorded by {curve.recordedBy}.{' '}
        {curve.testsJudged === 0 ? 'No test was judged by it yet.' : `${curve.testsJudged} ${curve.testsJudged === 1 ? 'test was' : 'tests were'} judged by it.`}
      </p>
      <CurveNotes curve={curve} />
      <CurveSuccession curve={curve} />
      <p className="mt-1 mb-4 text-ink-2">
        {coarse === null
          ? `Its stones (kept on the ${sieveWords(curve.method, curve.procedure)}) are not known: a test with 5 % of them or more cannot be judged by it.`
          : `Stones kept on the ${sieveWords(curve.method, curve.procedure)}: bulk specific gravity ${coarse.bulkGravity}, moisture ${units.percent(coarse.moisture)}.`}
      </p>
      {curve.points.length > 0 && <EnteredSpecimens curve={curve} />}
      <OversizePairs curve={curve} />
      <CurvePlot
        label={`Compaction curve ${curve.code}, ${curve.points.length} points, ${pairWords(curve.pair, units)}`}
        points={curve.points}
        drawn={fit.drawn.map(([moisture, dryDensity]) => ({ moisture, dryDensity }))}
        gs={curve.gs}
        pair={curve.pair}
        reported={reported}
      />
      {fit.refusal !== null && curve.points.length > 0 && <p className="mt-3 mb-0 font-medium text-warn">The points alone make no reference. {fit.refusal}</p>}
      <FitsTable fits={fit} gs={curve.gs} reported={reported} inUse={curve.pairFrom} />
      {reported !== null && <p className="mt-2 mb-0 text-ink-2">Laboratory’s own pair: {reported.reason}</p>}
      <FitWarnings warnings={fit.warnings} />
      <div className="mt-6">
        <SubjectFiles of={{ subject: 'curve', subjectId: curve.id }} side="contractor" title="Laboratory report" none="No report yet. Add the laboratory’s sheet as a PDF, or a photo of it." />
      </div>
      {approving && <ApproveDialog curve={curve} onClose={() => setApproving(false)} />}
    </section>
  )
}
