import { useQuery } from '@tanstack/react-query'
import { Link, useParams } from 'react-router-dom'
import { formatHoleVolume } from '#shared/units/format.ts'
import { fileSideOfTest } from '#shared/policies/attachment.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { paths } from '#web/app/paths.ts'
import { SubjectFiles } from '#web/components/files/subject-files.tsx'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { testQueries } from '#web/data/test/queries.ts'
import { isApiError } from '#web/lib/api-error.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CheckCurveLink } from './check-curve-link.tsx'
import { FrozenCriteria } from './saved/frozen-criteria.tsx'
import { PrintFoot, PrintHead } from './saved/print-parts.tsx'
import { SheetCalibrations } from './saved/sheet-calibrations.tsx'
import { sheetParts } from './saved/sheet-rows.ts'
import { RowList, SheetSection } from './saved/sheet-section.tsx'
import { TestActions } from './saved/test-actions.tsx'
import { TestChain } from './saved/test-chain.tsx'
import { TestEvents } from './saved/test-events.tsx'
import { TestNotices } from './saved/test-notices.tsx'
import { TestPlace, TestReach } from './saved/test-place.tsx'
import { TestVerdict } from './saved/test-verdict.tsx'
import { VerdictHistory } from './saved/verdict-history.tsx'
import './saved/print.css'

/** One test: its verdict, raw sheet, frozen limits, place, chain and audit trail. */
export function TestPage() {
  const { testId = '' } = useParams()
  const { site } = useSite()
  const { data, error, refetch } = useQuery(testQueries.detail(site.id, testId))
  usePageTitle(data === undefined ? 'Test' : data.number)
  if (data !== undefined) return <TestSheet test={data} />
  if (error !== null && isApiError(error) && (error.status === 404 || error.status === 400)) {
    return (
      <div className="p-[26px]">
        <EmptyState title="This test is not here" action={<Link to={paths.tests(site.id)} className={buttonClasses('plain')}>To the results</Link>}>
          The address may be mistyped, or the test belongs to another site.
        </EmptyState>
      </div>
    )
  }
  if (error !== null) {
    return (
      <Banner tone="bad" title="The test could not be read." action={<button type="button" onClick={() => void refetch()}>Try again</button>}>
        {error.message}
      </Banner>
    )
  }
  return (
    <div className="flex-1 bg-sheet px-[26px] py-[22px]">
      <Skeleton label="The test is on its way" lines={[32, 64, 58, 61, 40]} />
    </div>
  )
}

/** The volume of the hole or the cylinder, in feet where the sheet was read in pounds or feet. */
function volumeRow(sheet: TestDetail['sheet'], cm3: number) {
  const customary = ('massUnit' in sheet && sheet.massUnit === 'lb') || ('volumeUnit' in sheet && sheet.volumeUnit === 'ft3')
  return { label: sheet.method === 'drive-cylinder' ? 'Cylinder volume' : 'Hole volume', value: formatHoleVolume(cm3, customary ? 'us' : 'si') }
}

function TestSheet({ test }: { test: TestDetail }) {
  const { site, units } = useSite()
  const reduced = reduceSheet(test.sheet)
  const worked = [
    ...(reduced.ok && reduced.holeVolumeCm3 !== undefined ? [volumeRow(test.sheet, reduced.holeVolumeCm3)] : []),
    { label: 'Wet unit weight', value: units.density(test.wetDensity) },
    { label: 'Moisture', value: units.percent(test.moisture) },
    { label: 'Dry unit weight', value: units.density(test.dryDensity) },
    { label: 'Max dry unit weight used', value: units.density(test.verdict.maxDryDensityUsed) },
    { label: 'Optimum used', value: units.percent(test.verdict.optimumUsed) },
    { label: 'Specific gravity', value: `${units.number(test.verdict.gsUsed, 2)}, ${test.verdict.against.curve.gsMeasured ? 'measured' : 'assumed'}` },
    ...(test.oversizePercent === null ? [] : [{ label: 'Oversize', value: `${units.percent(test.oversizePercent)}${test.verdict.oversizeCorrected ? ', corrected for' : ''}` }]),
  ]
  return (
    <div className="test-sheet flex min-h-0 flex-1 flex-col">
      <header className="flex min-h-14 shrink-0 flex-wrap items-center gap-x-[18px] gap-y-2 border-b-2 border-ink bg-raised px-4 py-2 sm:px-[26px]">
        <h1 className="m-0 text-[18px] font-bold">{test.number}</h1>
        <Link to={paths.tests(site.id)} className="link-ink print:hidden">
          All results
        </Link>
        <PrintHead test={test} />
        <TestActions test={test} />
        <Button kind="quiet" className="print:hidden max-sm:hidden" onClick={() => window.print()}>
          Print
        </Button>
      </header>
      <div className="test-parts min-h-0 flex-1 overflow-y-auto lg:grid lg:grid-cols-[minmax(0,1fr)_minmax(400px,42%)]">
        <div className="verdict-side bg-sheet px-4 pt-[22px] pb-6 sm:px-[26px] lg:order-2">
          <TestNotices test={test} />
          <TestVerdict test={test} />
        </div>
        <div className="data-side bg-raised px-4 pt-5 pb-8 sm:px-[26px] lg:border-r lg:border-rule-2">
          {sheetParts(test.sheet, test.gauge).map(({ title, aside, rows }) => (
            <SheetSection key={title} title={title} aside={aside}>
              <RowList rows={rows} />
            </SheetSection>
          ))}
          <SheetCalibrations sheet={test.sheet} />
          <SheetSection title="Comes to" aside={`curve ${test.curveCode}`}>
            <RowList rows={worked} />
            {!test.voided && <CheckCurveLink curveId={test.curveId} testId={test.id} />}
          </SheetSection>
          <FrozenCriteria test={test} />
          <TestPlace test={test} />
          <TestReach test={test} />
          {test.remarks !== '' && (
            <SheetSection title="Remarks">
              <p className="m-0 break-words whitespace-pre-wrap">{test.remarks}</p>
            </SheetSection>
          )}
          <VerdictHistory test={test} />
          <SubjectFiles of={{ subject: 'test', subjectId: test.id }} side={fileSideOfTest(test.purpose)} title="Photos and documents" none="No photo yet. One of the hole and one of the place show later where this was." />
          <TestChain test={test} />
          <TestEvents testId={test.id} />
        </div>
      </div>
      <PrintFoot test={test} />
    </div>
  )
}
