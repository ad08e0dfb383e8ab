import { useEffect, useState } from 'react'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { useMe } from '#web/data/session/use-me.ts'
import { useSiteMoment } from '#web/data/site/use-site-clock.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { METHOD_WORDS, PURPOSE_WORDS } from '#web/features/tests/outcome-words.ts'

/** What a sheet of paper says first: whose site, which test. Only printed. */
export function PrintHead({ test }: { test: TestDetail }) {
  const { site } = useSite()
  return (
    <div className="hidden items-baseline justify-between gap-6 print:flex print:flex-1">
      <span>
        Field density test, {PURPOSE_WORDS[test.purpose].name.toLowerCase()}, {METHOD_WORDS[test.method].name.toLowerCase()}
      </span>
      <span className="text-right">
        <b className="font-bold">{site.name}</b>
        {site.subtitle !== '' && `, ${site.subtitle}`}
      </span>
    </div>
  )
}

const SIGNATURES = ['Tested by', 'Reviewed for quality control', 'For the owner'] as const

/** Lines to sign on, and when and by whom it was printed: what changes after that is not on the paper. */
export function PrintFoot({ test }: { test: TestDetail }) {
  const { site, units } = useSite()
  const me = useMe()
  const toSiteTime = useSiteMoment(site.id)
  const [moment, setMoment] = useState(() => Date.now())
  useEffect(() => {
    const note = (): void => setMoment(Date.now())
    window.addEventListener('beforeprint', note)
    return () => window.removeEventListener('beforeprint', note)
  }, [])
  const at = toSiteTime(moment)
  return (
    <footer className="print-foot hidden print:block">
      <div className="grid grid-cols-3 gap-x-6">
        {SIGNATURES.map((who) => (
          <div key={who} className="border-t border-ink pt-1">
            {who}
            {who === 'Tested by' && `: ${test.recordedBy.name}`}
            <span className="float-right">Date</span>
          </div>
        ))}
      </div>
      <p className="mt-2 mb-0 text-ink-2">
        Printed {units.fullDate(at)}, {units.time(at)} ({site.timeZone}){me !== null && ` by ${me.name}`}. The record itself may have moved on since: test {test.number}, {test.id}.
      </p>
    </footer>
  )
}
