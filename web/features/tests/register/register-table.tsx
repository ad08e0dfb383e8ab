import { Link, useNavigate } from 'react-router-dom'
import type { TestSummary } from '#shared/schemas/field-test.ts'
import { paths } from '#web/app/paths.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { markOf, METHOD_WORDS, resultWord } from '#web/features/tests/outcome-words.ts'

/** Result, mark and whether it is still in force. */
export function ResultCell({ test }: { test: TestSummary }) {
  const off = test.voided || test.superseded || !test.current
  const standing = test.voided ? 'void' : test.superseded ? 'out of force' : test.current ? '' : 'retested'
  return (
    <span className="flex items-center gap-2 leading-[1.4] whitespace-nowrap">
      <TestMark outcome={markOf(test)} verification={test.purpose === 'verification'} size={22} decorative className={classNames('-my-1', off && 'opacity-45')} />
      <span className={classNames(test.voided && 'line-through', off && 'text-ink-2')}>{resultWord(test)}</span>
      {standing !== '' && <span className="text-small text-ink-2">{standing}</span>}
      {test.flagged && <span className="text-small font-semibold text-warn">flagged</span>}
    </span>
  )
}

/** The register; the whole row opens the sheet, its number is the link. */
export function RegisterTable({ tests }: { tests: readonly TestSummary[] }) {
  const { site, units, label, zone } = useSite()
  const navigate = useNavigate()
  return (
    <Table caption="Field tests" className="max-md:hidden">
      <thead>
        <tr>
          <HeadCell>Test</HeadCell>
          <HeadCell>Cell, lift</HeadCell>
          <HeadCell>Zone</HeadCell>
          <HeadCell className="max-xl:hidden">Method</HeadCell>
          <HeadCell numeric>Dry {units.marks.density}</HeadCell>
          <HeadCell numeric>RC %</HeadCell>
          <HeadCell numeric>w %</HeadCell>
          <HeadCell numeric>From opt.</HeadCell>
          <HeadCell>Result</HeadCell>
          <HeadCell>Sampled</HeadCell>
          <HeadCell className="max-xl:hidden">By</HeadCell>
        </tr>
      </thead>
      <tbody>
        {tests.map((test) => (
          <Row key={test.id} className="cursor-pointer hover:bg-film" onClick={() => void navigate(paths.test(site.id, test.id))}>
            <RowHead>
              <Link to={paths.test(site.id, test.id)} onClick={(event) => event.stopPropagation()} className="text-ink no-underline hover:underline">
                {test.number}
              </Link>
            </RowHead>
            <Cell className="whitespace-nowrap">{`${label(test.cell)}, ${test.lift}`}</Cell>
            <Cell className="whitespace-nowrap">{zone(test.zoneId)?.shortName}</Cell>
            <Cell className="whitespace-nowrap max-xl:hidden">{METHOD_WORDS[test.method].name}</Cell>
            <Cell numeric>{units.densityNumber(test.dryDensity)}</Cell>
            <Cell numeric>{units.number(test.rc, 1)}</Cell>
            <Cell numeric>{units.number(test.moisture, 1)}</Cell>
            <Cell numeric>{units.deviation(test.moistureDeviation)}</Cell>
            <Cell className="align-middle">
              <ResultCell test={test} />
            </Cell>
            <Cell className="whitespace-nowrap">{units.dateTime(test.sampledAt)}</Cell>
            <Cell className="whitespace-nowrap max-xl:hidden">{test.recordedBy.name}</Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  )
}

/** The register on a phone: two lines a test. */
export function RegisterList({ tests }: { tests: readonly TestSummary[] }) {
  const { site, units, label } = useSite()
  return (
    <ul aria-label="Field tests" className="m-0 list-none border-t border-ink p-0 md:hidden">
      {tests.map((test) => (
        <li key={test.id}>
          <Link to={paths.test(site.id, test.id)} className="block min-h-12 border-b border-rule py-[9px] text-ink no-underline">
            <span className="flex items-center justify-between gap-2">
              <b className="font-semibold">{test.number}</b>
              <ResultCell test={test} />
            </span>
            <span className="block text-small text-ink-2">
              {label(test.cell)}, lift {test.lift}, {units.percent(test.rc)}, {units.deviation(test.moistureDeviation)} from opt., {units.dateTime(test.sampledAt)}
            </span>
          </Link>
        </li>
      ))}
    </ul>
  )
}
