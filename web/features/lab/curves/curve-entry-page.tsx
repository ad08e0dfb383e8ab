import { useQuery } from '@tanstack/react-query'
import { Link, useParams } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { curveQueries } from '#web/data/curve/queries.ts'
import { materialQueries } from '#web/data/material/queries.ts'
import { useMe } from '#web/data/session/use-me.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CurveEntryForm } from './curve-entry-form.tsx'

/** A laboratory curve being entered, or a draft being put right: the sheet at the left, its fit at the right. */
export function CurveEntryPage() {
  const { curveId } = useParams()
  const { site } = useSite()
  const me = useMe()
  const materials = useQuery(materialQueries.list(site.id))
  const curve = useQuery({ ...curveQueries.detail(site.id, curveId ?? ''), enabled: curveId !== undefined })
  usePageTitle(curve.data === undefined ? 'New reference curve' : `Correct ${curve.data.code}`)
  const failed = materials.error ?? curve.error
  if (failed !== null) {
    const retry = () => void Promise.all([materials.refetch(), ...(curveId === undefined ? [] : [curve.refetch()])])
    return (
      <Banner tone="bad" title="The sheet cannot be opened yet." action={<button type="button" onClick={retry}>Try again</button>}>
        {failed.message}
      </Banner>
    )
  }
  if (me === null || materials.data === undefined || (curveId !== undefined && curve.data === undefined)) {
    return (
      <div className="flex-1 bg-raised px-4 py-[22px] sm:px-[26px]">
        <Skeleton label="The sheet is on its way" lines={[32, 64, 58, 61, 40]} />
      </div>
    )
  }
  const toLab = (
    <Link to={curve.data === undefined ? paths.lab(site.id) : paths.curve(site.id, curve.data.id)} className={buttonClasses('plain')}>
      To the curves
    </Link>
  )
  if (materials.data.length === 0) {
    return (
      <div className="p-4 sm:p-[26px]">
        <EmptyState title="No material yet" action={toLab}>
          A curve is of a borrow material. Record the material first.
        </EmptyState>
      </div>
    )
  }
  if (curve.data !== undefined && (curve.data.status !== 'draft' || curve.data.testsJudged > 0)) {
    return (
      <div className="p-4 sm:p-[26px]">
        <EmptyState title={`${curve.data.code} is not changed any more`} action={toLab}>
          {curve.data.status === 'draft' ? 'Tests were judged by it already.' : 'It is no draft any more.'} Record a new curve where another is right.
        </EmptyState>
      </div>
    )
  }
  return <CurveEntryForm key={curveId ?? 'new'} userId={me.id} materials={materials.data} curve={curve.data} />
}
