import { useQuery } from '@tanstack/react-query'
import { useMemo, useState } from 'react'
import { Link, useSearchParams } from 'react-router-dom'
import type { Curve } from '#shared/schemas/lab.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { curveQueries } from '#web/data/curve/queries.ts'
import { useMe } from '#web/data/session/use-me.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { stakeQueries } from '#web/data/stake/queries.ts'
import { testQueries } from '#web/data/test/queries.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { draftKey, keepDraft, readDraft, readHabits } from './record/keep.ts'
import { openForm, readOpening } from './record/opening.ts'
import { purposesFor } from './record/purpose-fields.tsx'
import { RecordForm } from './record/record-form.tsx'
import { emptyForm } from './record/test-form.ts'

const RANK = { approved: 0, draft: 1, superseded: 2, withdrawn: 3 } as const
const byStanding = (a: Curve, b: Curve): number => RANK[a.status] - RANK[b.status] || a.code.localeCompare(b.code)

/** Recording a field test: the sheet at the left, what it comes to at the right. */
export function NewTestPage() {
  usePageTitle('Record a field test')
  const { site, cells, units, can } = useSite()
  const [search] = useSearchParams()
  const me = useMe()
  const now = useSiteClock(site.id)
  const [round, setRound] = useState(0)
  const opening = useMemo(() => readOpening(search), [search])
  const stakes = useQuery(stakeQueries.list(site.id))
  const curves = useQuery(curveQueries.list(site.id))
  const followedId = opening.follows?.testId ?? ''
  const followed = useQuery({ ...testQueries.detail(site.id, followedId), enabled: followedId !== '' })
  const purposes = purposesFor(can)
  const sorted = useMemo(() => (curves.data ?? []).filter((curve) => curve.status !== 'withdrawn').sort(byStanding), [curves.data])

  if (purposes.length === 0) {
    return (
      <div className="p-[26px]">
        <EmptyState title="Your role does not record tests" action={<Link to={paths.tests(site.id)} className={buttonClasses('plain')}>To the results</Link>}>
          Quality control records the contractor’s tests, the owner’s representative the verification tests.
        </EmptyState>
      </div>
    )
  }
  const error = stakes.error ?? curves.error ?? followed.error
  if (error !== null) {
    const retry = (): void => {
      for (const query of [stakes, curves, followed]) if (query.error !== null) void query.refetch()
    }
    return (
      <Banner tone="bad" title="The sheet cannot be opened yet." action={<button type="button" onClick={retry}>Try again</button>}>
        {error.message}
      </Banner>
    )
  }
  if (me === null || stakes.data === undefined || curves.data === undefined || (followedId !== '' && followed.data === undefined)) {
    return (
      <div className="flex-1 bg-raised px-[26px] py-[22px]">
        <Skeleton label="The sheet is on its way" lines={[32, 64, 58, 61, 40]} />
      </div>
    )
  }
  const key = draftKey(me.id, site.id, search.toString())
  return (
    <OpenSheet
      key={`${key} ${round}`}
      draft={key}
      build={() => {
        const habits = readHabits(me.id)
        const openedAt = new Date(now()).toISOString()
        const blank = emptyForm({ id: crypto.randomUUID(), openedAt, sampledAt: units.field.instant(openedAt) }, site.unitSystem, habits)
        return openForm(blank, opening, { stakes: stakes.data, cells, followed: followed.data ?? null, purposes, habits })
      }}
      rest={{ userId: me.id, stakes: stakes.data, curves: sorted, follows: opening.follows, followed: followed.data ?? null }}
      onStartAfresh={() => {
        keepDraft(key, null)
        setRound(round + 1)
      }}
    />
  )
}

type OpenSheetProps = {
  draft: string
  build: () => ReturnType<typeof emptyForm>
  rest: Omit<Parameters<typeof RecordForm>[0], 'draft' | 'start' | 'restored' | 'onStartAfresh'>
  onStartAfresh: () => void
}

/** Starts from the draft where there is one; the start stays the same while the sheet is open. */
function OpenSheet({ draft, build, rest, onStartAfresh }: OpenSheetProps) {
  const [{ start, restored }] = useState(() => {
    const blank = build()
    const kept = readDraft(draft, blank)
    return { start: kept ?? blank, restored: kept !== null }
  })
  return <RecordForm {...rest} draft={draft} start={start} restored={restored} onStartAfresh={onStartAfresh} />
}
