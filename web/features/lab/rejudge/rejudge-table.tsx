import { Link } from 'react-router-dom'
import type { RejudgedTest, VerdictBrief } from '#shared/schemas/rejudge.ts'
import { paths } from '#web/app/paths.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { markOf, resultWord } from '#web/components/ui/test-outcome.ts'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { effectWords } from './rejudge-words.ts'

type RejudgeTableProps = {
  tests: readonly RejudgedTest[]
  choosable: (test: RejudgedTest) => boolean
  ticked: ReadonlySet<string>
  onTick: (ids: readonly string[], on: boolean) => void
  /** whether tests are chosen here at all */
  selecting: boolean
}

const BOX = 'size-5 accent-ink align-middle'

export function RejudgeTable(props: RejudgeTableProps) {
  const { tests, choosable, ticked, onTick, selecting } = props
  const own = tests.filter(choosable).map((test) => test.id)
  const all = own.length > 0 && own.every((id) => ticked.has(id))
  const allShown = selecting && (
    <label className="flex min-h-11 cursor-pointer items-center gap-3 font-semibold md:min-h-0">
      <input type="checkbox" className={BOX} checked={all} disabled={own.length === 0} onChange={(event) => onTick(own, event.target.checked)} />
      <span className="md:sr-only">All that are shown</span>
    </label>
  )
  return (
    <>
      <Table caption="Verdicts before and after" className="max-md:hidden print:block!">
        <thead>
          <tr>
            {selecting && <HeadCell className="w-8 pl-0 print:hidden">{allShown}</HeadCell>}
            <HeadCell>Test</HeadCell>
            <HeadCell>Cell, lift</HeadCell>
            <HeadCell>Sampled</HeadCell>
            <HeadCell numeric>RC %</HeadCell>
            <HeadCell numeric>From opt.</HeadCell>
            <HeadCell>Verdict now</HeadCell>
            <HeadCell>Verdict then</HeadCell>
            <HeadCell>What it would do</HeadCell>
          </tr>
        </thead>
        <tbody>
          {tests.map((test) => (
            <TestRow key={test.id} test={test} {...props} />
          ))}
        </tbody>
      </Table>
      <div className="border-t border-ink md:hidden print:hidden">
        {allShown}
        <ul aria-label="Verdicts before and after" className="m-0 list-none p-0">
          {tests.map((test) => (
            <TestItem key={test.id} test={test} {...props} />
          ))}
        </ul>
      </div>
    </>
  )
}

type RowProps = Omit<RejudgeTableProps, 'tests'> & { test: RejudgedTest }

function Tick({ test, choosable, ticked, onTick }: RowProps) {
  if (!choosable(test)) return null
  return <input type="checkbox" aria-label={`Judge ${test.number} again`} className={BOX} checked={ticked.has(test.id)} onChange={(event) => onTick([test.id], event.target.checked)} />
}

function TestRow(props: RowProps) {
  const { test, selecting, ticked } = props
  const { site, units, label } = useSite()
  const { before, after } = test
  return (
    <Row selected={ticked.has(test.id)}>
      {selecting && (
        <Cell className="pl-0 print:hidden">
          <Tick {...props} />
        </Cell>
      )}
      <RowHead>
        <Link to={paths.test(site.id, test.id)} className="text-ink no-underline hover:underline">
          {test.number}
        </Link>
      </RowHead>
      <Cell className="whitespace-nowrap">{`${label(test.cell)}, ${test.lift}`}</Cell>
      <Cell className="whitespace-nowrap">{units.date(test.sampledAt)}</Cell>
      <Cell numeric>{fromTo(units.number(before.rc, 1), after && units.number(after.rc, 1))}</Cell>
      <Cell numeric>{fromTo(units.deviation(before.moistureDeviation), after && units.deviation(after.moistureDeviation))}</Cell>
      <Cell>
        <Verdict brief={before} purpose={test.purpose} />
      </Cell>
      <Cell>{after === null ? <span className="font-medium text-bad">Cannot be judged. {test.refusal}</span> : <Verdict brief={after} purpose={test.purpose} strong={test.change !== 'figures'} />}</Cell>
      <Cell className="min-w-[170px] text-ink-2">{does(test)}</Cell>
    </Row>
  )
}

function TestItem(props: RowProps) {
  const { test } = props
  const { site, units, label } = useSite()
  const { before, after } = test
  return (
    <li className="flex gap-3 border-b border-rule py-[9px]">
      {props.selecting && (
        <label className="grid min-h-11 w-8 shrink-0 place-items-start pt-[2px]">
          <Tick {...props} />
        </label>
      )}
      <div className="min-w-0 flex-1">
        <span className="flex flex-wrap items-baseline justify-between gap-x-2">
          <Link to={paths.test(site.id, test.id)} className="link-ink inline-flex min-h-6 font-semibold">
            {test.number}
          </Link>
          <span className="text-small text-ink-2">
            {label(test.cell)}, lift {test.lift}, {units.date(test.sampledAt)}
          </span>
        </span>
        <span className="my-1 grid gap-1">
          <Verdict brief={before} purpose={test.purpose} figures />
          {after === null ? <span className="font-medium text-bad">Cannot be judged. {test.refusal}</span> : <Verdict brief={after} purpose={test.purpose} strong={test.change !== 'figures'} figures />}
        </span>
        {does(test) !== '' && <span className="block text-small text-ink-2">{does(test)}</span>}
      </div>
    </li>
  )
}

function does(test: RejudgedTest): string {
  const effect = effectWords(test)
  return test.mine ? effect : [effect, `the ${test.purpose === 'verification' || test.purpose === 'referee' ? 'owner’s' : 'lead’s'} to judge again`].filter(Boolean).join('; ')
}

function fromTo(before: string, after: string | null): string {
  return after === null ? before : `${before} → ${after}`
}

function Verdict({ brief, purpose, strong = false, figures = false }: { brief: VerdictBrief; purpose: RejudgedTest['purpose']; strong?: boolean; figures?: boolean }) {
  const { units } = useSite()
  return (
    <span className="flex items-center gap-2 leading-[1.4]">
      <TestMark outcome={markOf(brief)} verification={purpose === 'verification'} size={20} decorative className="-my-1 shrink-0" />
      <span className={classNames('md:whitespace-nowrap', strong && 'font-semibold')}>{resultWord(brief)}</span>
      {figures && (
        <span className="num ml-auto text-small whitespace-nowrap text-ink-2">
          {units.percent(brief.rc)}, {units.deviation(brief.moistureDeviation)}
        </span>
      )}
    </span>
  )
}
