import { useEffect, useRef } from 'react'
import { Link } from 'react-router-dom'
import type { CreateTest, TestDetail } from '#shared/schemas/field-test.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { countOf } from '#web/features/tests/outcome-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { useRecord } from './record-context.tsx'
import type { Saving } from './use-saving.ts'

type FormNoticesProps = {
  saving: Saving
  restored: boolean
  onStartAfresh: () => void
  /** version of the specification that the lot froze */
  lotVersion: number | null
  followed: TestDetail | null
  follows: CreateTest['follows']
}

/** What must be known about the whole sheet, over its fields. */
export function FormNotices({ saving, restored, onStartAfresh, lotVersion, followed, follows }: FormNoticesProps) {
  const { site } = useSite()
  const { assessment, attempted } = useRecord()
  const { place, problems } = assessment
  const notices = useRef<HTMLDivElement>(null)
  const otherVersion = place !== null && lotVersion !== null && lotVersion !== place.zone.specification.version
  const stopped = attempted && problems.size > 0 && saving.server === null
  const failure = saving.server?.sent
  useEffect(() => {
    // the button stands far from what it says
    if (failure !== undefined) notices.current?.scrollIntoView({ block: 'nearest' })
  }, [failure])
  if (!restored && saving.server === null && !stopped && !otherVersion && followed === null) return null
  return (
    <div ref={notices} className="mb-[18px] grid scroll-mt-24 gap-2">
      {saving.server !== null && (
        <Banner tone="bad" title="Not saved.">
          {saving.server.message}
        </Banner>
      )}
      {stopped && (
        <Banner tone="bad" title="Not saved yet.">
          {countOf(problems.size, 'field')} {problems.size === 1 ? 'needs' : 'need'} a look. Everything typed is kept.
        </Banner>
      )}
      {restored && (
        <Banner
          title="What you typed here before is back."
          action={
            <button type="button" onClick={onStartAfresh}>
              Start afresh
            </button>
          }
        />
      )}
      {followed !== null && (
        <Banner title={`${follows?.kind === 'rerun' ? 'Re-run' : 'Retest'} of ${followed.number}.`} action={<Link to={paths.test(site.id, followed.id)}>Open {followed.number}</Link>}>
          {followed.headline}.{follows?.kind === 'rerun' && ' Take it within 1 m of the first reading, and say the cause in the remarks.'}
        </Banner>
      )}
      {otherVersion && (
        <Banner title={`This lot is judged by version ${lotVersion} of its specification.`}>
          The verdict beside is by version {place.zone.specification.version}; the saved one is the server’s.
        </Banner>
      )}
    </div>
  )
}
