import { Link, useLocation } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** To a one-point check of the curve a test is judged by, and back to this sheet; what is typed here is kept. */
export function CheckCurveLink({ curveId, testId }: { curveId: string; testId?: string }) {
  const { site, can } = useSite()
  const { pathname, search } = useLocation()
  if (!can('one-point.record')) return null
  const asked = new URLSearchParams({ new: '1', curve: curveId, ...(testId === undefined ? {} : { test: testId }), back: `${pathname}${search}` })
  return (
    <Link to={`${paths.onePoint(site.id)}?${asked.toString()}`} className="link-ink inline-flex min-h-6 items-center text-small pointer-coarse:min-h-11 print:hidden">
      Check the curve with one point
    </Link>
  )
}
