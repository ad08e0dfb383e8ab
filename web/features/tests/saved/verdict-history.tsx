import { useQuery } from '@tanstack/react-query'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import type { VerdictHistory as History } from '#shared/schemas/rejudge.ts'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { rejudgeQueries } from '#web/data/rejudge/queries.ts'
import { cellsWords } from '#web/features/tests/cells-words.ts'
import { markOf } from '#web/features/tests/outcome-words.ts'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { SheetSection } from './sheet-section.tsx'

type Kept = History['verdicts'][number]

const MARK_WORDS = { fail: 'marked for rework', suspect: 'marked suspect', hold: 'put on hold' } as const

/** Every verdict the test had, the one in force first; nothing where it was judged once. */
export function VerdictHistory({ test }: { test: TestDetail }) {
  const { site } = useSite()
  const { data } = useQuery(rejudgeQueries.history(site.id, test.id))
  if (data === undefined || data.length === 0) return null
  return (
    <SheetSection title="Verdicts" aside="every one is kept">
      <ol className="m-0 list-none p-0">
        {data.toReversed().map((kept) => (
          <Entry key={kept.version} kept={kept} purpose={test.purpose} />
        ))}
      </ol>
    </SheetSection>
  )
}

function Entry({ kept, purpose }: { kept: Kept; purpose: TestDetail['purpose'] }) {
  const { units, lookup } = useSite()
  const { verdict, curve, current } = kept
  return (
    <li className={classNames('grid grid-cols-[22px_1fr_auto] items-start gap-x-[10px] border-b border-rule px-1 py-[7px]', current && 'bg-film')}>
      <TestMark outcome={markOf(verdict)} verification={purpose === 'verification'} decorative className={classNames(!current && 'opacity-45')} />
      <span className="min-w-0">
        <b className="font-semibold">{verdict.headline}</b>
        <span className="block text-ink-2">
          By {curve.code}: {units.percent(verdict.rc)} of {units.density(verdict.maxDryDensityUsed)}, {units.deviation(verdict.moistureDeviation)} from {units.percent(verdict.optimumUsed)}
        </span>
        {kept.marks.map((mark) => (
          <span key={mark.kind} className="block text-small text-ink-2">
            {cellsWords(mark.cells, lookup)} {MARK_WORDS[mark.kind]}
          </span>
        ))}
        <span className="block text-small text-ink-2">
          {kept.reason === null ? 'As recorded' : `Judged again: ${kept.reason}`}, {kept.judgedBy.name}, {units.dateTime(kept.judgedAt)}
        </span>
      </span>
      <span className="text-small font-semibold whitespace-nowrap">{current ? 'in force' : `no. ${kept.version}`}</span>
    </li>
  )
}
