import { useMemo, useState } from 'react'
import type { Curve } from '#shared/schemas/lab.ts'
import type { RejudgeAnswer, RejudgedTest, Rejudging } from '#shared/schemas/rejudge.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { SelectField } from '#web/components/ui/text-fields.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { filterChoices, filterRejudged, sortRejudged, type RejudgeFilter } from './rejudge-filter.ts'
import { RejudgeDialog } from './rejudge-dialog.tsx'
import { RejudgeDone } from './rejudge-effects.tsx'
import { RejudgeTable } from './rejudge-table.tsx'
import { countOf } from './rejudge-words.ts'

/** Every test of the old curve as it is and as it would be, and the choice of those that are judged again. */
export function RejudgeTests({ rejudging, curve }: { rejudging: Rejudging; curve: Curve }) {
  const { can } = useSite()
  const { by, tests } = rejudging
  const [asked, setAsked] = useState<RejudgeFilter | null>(null)
  const [ticked, setTicked] = useState<ReadonlySet<string>>(new Set())
  const [asking, setAsking] = useState(false)
  const [done, setDone] = useState<RejudgeAnswer | null>(null)
  const sorted = useMemo(() => sortRejudged(tests), [tests])
  const choices = filterChoices(tests)
  const usual = filterRejudged(tests, 'changed').length > 0 ? 'changed' : 'all'
  const filter = asked !== null && choices.some((choice) => choice.value === asked) ? asked : usual
  const shown = filterRejudged(sorted, filter)
  const may = curve.superseded !== null && (can('test.rejudge') || can('test.rejudge-qa'))
  const choosable = (test: RejudgedTest) => may && test.mine && test.after !== null
  const chosen = sorted.filter((test) => ticked.has(test.id) && choosable(test))
  const tick = (ids: readonly string[], on: boolean) =>
    setTicked((before) => {
      const next = new Set(before)
      for (const id of ids) {
        if (on) next.add(id)
        else next.delete(id)
      }
      return next
    })
  return (
    <section>
      {done !== null && <RejudgeDone answer={done} by={by.code} />}
      <SectionHead aside={`${curve.code} to ${by.code}`}>{tests.length === 0 ? 'Tests' : `${countOf(tests.length, 'test')} judged by ${curve.code}`}</SectionHead>
      {tests.length === 0 ? (
        <EmptyState title={`No test is judged by ${curve.code}${done === null ? '' : ' any more'}`}>Void tests are left out. New tests take {by.code}.</EmptyState>
      ) : (
        <>
          <div className="mb-3 max-md:hidden print:hidden">
            <Segmented label="Which tests" options={choices} value={filter} onChange={setAsked} />
          </div>
          <SelectField className="mb-3 md:hidden print:hidden" label="Which tests" value={filter} onChange={(event) => setAsked(choices.find((choice) => choice.value === event.target.value)?.value ?? null)}>
            {choices.map((choice) => (
              <option key={choice.value} value={choice.value}>
                {choice.label}
              </option>
            ))}
          </SelectField>
          {shown.length === 0 ? <p className="m-0 text-ink-2">No verdict changes: only figures move.</p> : <RejudgeTable tests={shown} choosable={choosable} ticked={ticked} onTick={tick} selecting={may} />}
          {may && (
            <div className="sticky bottom-0 -mx-4 mt-3 flex flex-wrap items-center gap-3 border-t border-ink bg-raised px-4 py-3 sm:mx-0 sm:px-0 print:hidden">
              <Button kind="primary" disabled={chosen.length === 0} className="pointer-coarse:min-h-11" onClick={() => setAsking(true)}>
                {chosen.length === 0 ? 'Judge again' : `Judge ${countOf(chosen.length, 'test')} again`}
              </Button>
              <span className="text-ink-2">{chosen.length === 0 ? 'Choose tests first. You see what it does before it is done.' : `${filterRejudged(chosen, 'changed').length} of them with another verdict`}</span>
            </div>
          )}
        </>
      )}
      {asking && (
        <RejudgeDialog
          curve={curve}
          by={by}
          tests={chosen}
          onClose={() => setAsking(false)}
          onDone={(answer) => {
            setAsking(false)
            setTicked(new Set())
            setDone(answer)
          }}
        />
      )}
    </section>
  )
}
