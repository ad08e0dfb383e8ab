import { useQuery } from '@tanstack/react-query'
import { Link, useSearchParams } from 'react-router-dom'
import type { OnePointCheck } from '#shared/schemas/one-point.ts'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { curveQueries } from '#web/data/curve/queries.ts'
import { onePointQueries } from '#web/data/one-point/queries.ts'
import { LabFrame } from '#web/features/lab/lab-frame.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { OnePointEntry } from './one-point-entry.tsx'
import { OnePointSheet } from './one-point-sheet.tsx'
import { shortWords } from './one-point-words.ts'

/** One-point checks: does the curve in use fit the soil that is being placed? */
export function OnePointPage() {
  usePageTitle('One-point checks')
  const { site, can } = useSite()
  const [search, setSearch] = useSearchParams()
  const curves = useQuery(curveQueries.list(site.id))
  const checks = useQuery(onePointQueries.list(site.id))
  const entering = search.has('new') && can('one-point.record')
  const back = backTo(search.get('back'), site.id)
  const chosen = checks.data?.find((check) => check.id === search.get('check')) ?? checks.data?.find((check) => check.void === null) ?? checks.data?.[0]
  const hasFamily = curves.data?.some((curve) => curve.status !== 'draft' && curve.pair !== null) ?? false
  const show = (id: string) => setSearch(back === null ? { check: id } : { check: id, back }, { replace: true })
  const ready = curves.data !== undefined && checks.data !== undefined
  const failed = curves.error ?? checks.error
  const backLink = back !== null && (
    <Link to={back} className={buttonClasses('plain', 'regular', 'pointer-coarse:min-h-11')}>
      Back to the test
    </Link>
  )
  return (
    <LabFrame
      summary={ready && !entering ? summaryOf(checks.data) : 'One specimen in the mould tells which curve of the family the soil follows'}
      actions={
        <>
          {backLink}
          {!entering && hasFamily && can('one-point.record') && (
            <Button kind="primary" className="pointer-coarse:min-h-11" onClick={() => setSearch({ new: '1' })}>
              New check
            </Button>
          )}
        </>
      }
      failed={failed}
      onRetry={() => void Promise.all([curves.refetch(), checks.refetch()])}
    >
      <div className="px-4 pb-10 sm:px-[26px]">
        {!ready && failed === null && <Skeleton label="The checks are on their way" lines={[60, 72, 66, 40]} />}
        {ready && entering && <OnePointEntry curves={curves.data} curveId={search.get('curve')} testId={search.get('test')} onSaved={(check) => show(check.id)} onLeave={() => setSearch(back === null ? {} : { back }, { replace: true })} />}
        {ready && !entering && chosen === undefined && (
          <div className="max-w-[640px]">
            <EmptyState title="No check yet" action={hasFamily && can('one-point.record') ? <Button onClick={() => setSearch({ new: '1' })}>New check</Button> : undefined}>
              {hasFamily ? 'Compact one specimen of the soil that is being placed, a little dry of optimum, and see which curve it follows.' : 'A check needs an approved curve to compare with, better three of one material.'}
            </EmptyState>
          </div>
        )}
        {ready && !entering && chosen !== undefined && (
          <div className="grid gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,1fr)_minmax(440px,600px)]">
            <section className="min-w-0">
              <SectionHead>Checks</SectionHead>
              <Register checks={checks.data} chosen={chosen.id} onChoose={show} />
            </section>
            <div className="min-w-0 xl:border-l xl:border-rule-2 xl:pl-10">
              <OnePointSheet key={chosen.id} check={chosen} curves={curves.data} />
            </div>
          </div>
        )}
      </div>
    </LabFrame>
  )
}

/** Only back to a sheet of this site. */
function backTo(address: string | null, siteId: string): string | null {
  return address !== null && address.startsWith(`${paths.site(siteId)}/`) ? address : null
}

function summaryOf(checks: readonly OnePointCheck[]): string {
  const standing = checks.filter((check) => check.void === null)
  const off = standing.filter((check) => check.result.off?.off === true).length
  return `${standing.length} ${standing.length === 1 ? 'check' : 'checks'}${off > 0 ? `, ${off} with the curve in use off` : ''}`
}

function Register({ checks, chosen, onChoose }: { checks: readonly OnePointCheck[]; chosen: string; onChoose: (id: string) => void }) {
  const { units } = useSite()
  return (
    <Table caption="One-point checks">
      <thead>
        <tr>
          <HeadCell className="pl-0">Check</HeadCell>
          <HeadCell>Finding</HeadCell>
          <HeadCell>Sampled</HeadCell>
          <HeadCell>Material</HeadCell>
          <HeadCell>In use</HeadCell>
          <HeadCell numeric>Dry {units.marks.density}</HeadCell>
          <HeadCell numeric>w %</HeadCell>
        </tr>
      </thead>
      <tbody>
        {checks.map((check) => (
          <Row key={check.id} selected={check.id === chosen}>
            <RowHead className="pl-0">
              <button type="button" aria-pressed={check.id === chosen} onClick={() => onChoose(check.id)} className={classNames('link-ink pointer-coarse:min-h-11', check.void !== null && 'line-through')}>
                {check.number}
              </button>
            </RowHead>
            <Cell className={classNames('whitespace-nowrap', check.result.off?.off === true && check.void === null && 'font-semibold text-warn')}>{check.void === null ? shortWords(check.result) : 'Void'}</Cell>
            <Cell className="whitespace-nowrap">{units.dateTime(check.sampledAt)}</Cell>
            <Cell className="whitespace-nowrap">{check.materialName}</Cell>
            <Cell>{check.result.inUse.code}</Cell>
            <Cell numeric>{units.densityNumber(check.dryDensity)}</Cell>
            <Cell numeric>{units.number(check.moisture, 1)}</Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  )
}
