import { Link } from 'react-router-dom'
import type { Curve } from '#shared/schemas/lab.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** What took the curve's place, with the way to the verdicts of its tests; for one in force, the way to supersede it. */
export function CurveSuccession({ curve }: { curve: Curve }) {
  const { site, can, units } = useSite()
  if (curve.status === 'draft') return null
  const to = paths.rejudge(site.id, curve.id)
  if (curve.superseded === null) {
    return can('curve.supersede') ? (
      <Link to={to} className={buttonClasses('plain', 'regular', 'mt-3 pointer-coarse:min-h-11')}>
        Supersede…
      </Link>
    ) : null
  }
  const { by, at, who, reason } = curve.superseded
  return (
    <Banner tone="off" className="my-3" title={`Superseded by ${by.code}.`} action={<Link to={to}>{curve.testsJudged > 0 ? 'Judge its tests again' : 'See its tests'}</Link>}>
      {units.fullDate(at)}, {who}: {reason}
    </Banner>
  )
}
