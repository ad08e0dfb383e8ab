import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useParams } from 'react-router-dom'
import type { Curve } from '#shared/schemas/lab.ts'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { curveQueries } from '#web/data/curve/queries.ts'
import { rejudgeQueries } from '#web/data/rejudge/queries.ts'
import { LabFrame } from '#web/features/lab/lab-frame.tsx'
import { pairWords } from '#web/features/lab/lab-words.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { RejudgeTests } from './rejudge-tests.tsx'
import './rejudge.css'
import { SupersedeForm } from './supersede-form.tsx'

/** The approved curves that may take a curve's place. */
function successorsOf(curve: Curve, curves: readonly Curve[]): Curve[] {
  return curves.filter((other) => other.id !== curve.id && other.status === 'approved' && other.materialId === curve.materialId)
}

/** A curve whose place another takes: first the curve, then, as an act of its own, the verdicts of its tests. */
export function RejudgePage() {
  const { curveId = '' } = useParams()
  const { site } = useSite()
  const curves = useQuery(curveQueries.list(site.id))
  const curve = curves.data?.find((each) => each.id === curveId)
  usePageTitle(curve === undefined ? 'Judge again' : `${curve.code}, judge again`)
  return (
    <LabFrame
      summary={curve === undefined ? undefined : curve.superseded === null ? `Supersede ${curve.code}` : `Tests judged by ${curve.code}`}
      failed={curves.error}
      onRetry={() => void curves.refetch()}
      actions={
        curve !== undefined && (
          <>
            <Button onClick={() => window.print()} className="pointer-coarse:min-h-11 print:hidden">
              Print
            </Button>
            <Link to={`${paths.lab(site.id)}?curve=${curve.id}`} className={buttonClasses('plain', 'regular', 'pointer-coarse:min-h-11 print:hidden')}>
              To {curve.code}
            </Link>
          </>
        )
      }
    >
      <div className="rejudge-sheet px-4 pb-10 sm:px-[26px]">
        {curves.data === undefined && curves.error === null && <Skeleton label="The curves are on their way" lines={[60, 72, 66]} />}
        {curves.data !== undefined && curve === undefined && (
          <EmptyState title="This curve is not here" action={<Link to={paths.lab(site.id)} className={buttonClasses('plain')}>To the curves</Link>}>
            The address may be mistyped, or the curve belongs to another site.
          </EmptyState>
        )}
        {curve !== undefined && curves.data !== undefined && <RejudgeSheet key={curve.id} curve={curve} curves={curves.data} />}
      </div>
    </LabFrame>
  )
}

function RejudgeSheet({ curve, curves }: { curve: Curve; curves: readonly Curve[] }) {
  const { site, units } = useSite()
  const choices = successorsOf(curve, curves)
  const [thought, setThought] = useState(choices.length === 1 ? (choices[0]?.id ?? '') : '')
  const by = curve.superseded === null ? (choices.some((choice) => choice.id === thought) ? thought : '') : null
  const table = useQuery({ ...rejudgeQueries.table(site.id, curve.id, by), enabled: by !== '' && curve.status !== 'draft' })
  if (curve.status === 'draft') return <EmptyState title={`${curve.code} is not approved`}>A draft is in nobody’s place, and nothing takes its own. Approve it, or record another.</EmptyState>
  return (
    <>
      {curve.superseded === null ? (
        <SupersedeForm curve={curve} choices={choices} chosen={thought} onChoose={setThought} />
      ) : (
        <section className="mb-7 max-w-[760px]">
          <SectionHead>Superseded</SectionHead>
          <p className="m-0">
            By {curve.superseded.by.code}, on {units.fullDate(curve.superseded.at)}, by {curve.superseded.who}: {curve.superseded.reason}
          </p>
          <p className="mt-1 mb-0 text-ink-2">
            {curve.code} gave {pairWords(curve.pair, units)}
            {table.data !== undefined && `; ${table.data.by.code} gives ${pairWords(table.data.by, units)}`}. No verdict changes until its test is judged again.
          </p>
        </section>
      )}
      {by !== '' && (
        <>
          {table.error !== null && (
            <p role="alert" className="font-medium text-bad">
              {table.error.message}{' '}
              <button type="button" className="link-ink" onClick={() => void table.refetch()}>
                Try again
              </button>
            </p>
          )}
          {table.data === undefined && table.error === null && <Skeleton label="The verdicts are being compared" lines={[96, 92, 94, 90]} />}
          {table.data !== undefined && <RejudgeTests key={`${curve.id} ${curve.status}`} rejudging={table.data} curve={curve} />}
        </>
      )}
    </>
  )
}
