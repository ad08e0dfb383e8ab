import { useState } from 'react'
import { Link } from 'react-router-dom'
import type { Board } from '#shared/schemas/ground.ts'
import { paths } from '#web/app/paths.ts'
import { PanelRows } from '#web/components/ui/panel-row.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { GroupRow, ShowButton } from './group-row.tsx'

type Exception = Board['exceptions'][number]

const FIRST = 6

function ExceptionMark({ kind }: { kind: Exception['kind'] }) {
  if (kind === 'covered-early') return <StateSwatch state="awaiting-test" covered />
  if (kind === 'hold') return <TestMark outcome="fails" verification decorative />
  if (kind === 'voided-failure' || kind === 'rejudged-failure' || kind === 'retest-without-rework') return <TestMark outcome="fails" decorative />
  return <StateSwatch state="not-placed" />
}

/** What stands on the record as out of the ordinary. */
export function ExceptionsSection({ exceptions }: { exceptions: readonly Exception[] }) {
  const { site, can } = useSite()
  const [all, setAll] = useState(false)
  const listed = all ? exceptions : exceptions.slice(0, FIRST)
  return (
    <PanelSection title="Exceptions" aside={exceptions.length === 0 ? 'none' : String(exceptions.length)}>
      {exceptions.length > 0 && (
        <PanelRows label="Exceptions">
          {listed.map((exception, index) => (
            <GroupRow
              key={`${exception.kind} ${exception.testId ?? ''} ${index}`}
              mark={<ExceptionMark kind={exception.kind} />}
              title={exception.text}
              detail={exception.detail}
              action={exception.cells.length > 0 ? <ShowButton cells={exception.cells} of={exception.text} /> : undefined}
              acts={exception.testId !== null && can('registers.see') ? <Link to={paths.test(site.id, exception.testId)}>Open the test</Link> : undefined}
            />
          ))}
        </PanelRows>
      )}
      {exceptions.length > FIRST && (
        <button type="button" className="link-ink mt-2 min-h-9 text-[13px]" onClick={() => setAll(!all)}>
          {all ? 'Show fewer' : `Show all ${exceptions.length}`}
        </button>
      )}
    </PanelSection>
  )
}
