import { Link } from 'react-router-dom'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { paths } from '#web/app/paths.ts'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { markOf } from '#web/features/tests/outcome-words.ts'
import { SheetSection } from './sheet-section.tsx'

/** The result that counts for a chain: its last that is not void. */
export function currentOfChain(chain: TestDetail['chain']): TestDetail['chain'][number] | undefined {
  return chain.findLast((entry) => !entry.voided)
}

/** The test and what followed it, in the order they were sampled. */
export function TestChain({ test }: { test: TestDetail }) {
  const { site, units } = useSite()
  const current = currentOfChain(test.chain)
  return (
    <SheetSection title="Chain" aside="the last that is not void counts">
      <ol className="m-0 list-none p-0">
        {test.chain.map((entry) => {
          const here = entry.id === test.id
          return (
            <li key={entry.id} aria-current={here || undefined} className={classNames('grid grid-cols-[22px_minmax(92px,auto)_1fr_auto] items-center gap-[10px] border-b border-rule px-1 py-[7px]', here && 'bg-film')}>
              <TestMark outcome={markOf({ outcome: entry.outcome, near: false })} decorative className={classNames(entry.voided && 'opacity-40')} />
              <span className={classNames('font-semibold whitespace-nowrap', entry.voided && 'line-through')}>{here ? entry.number : <Link to={paths.test(site.id, entry.id)} className="link-ink">{entry.number}</Link>}</span>
              <span className="min-w-0 text-ink-2">
                {entry.headline}, {units.percent(entry.rc)}, {units.dateTime(entry.sampledAt)}
              </span>
              <span className="text-small font-semibold">{entry.voided ? 'void' : entry.id === current?.id ? 'counts' : ''}</span>
            </li>
          )
        })}
      </ol>
    </SheetSection>
  )
}
