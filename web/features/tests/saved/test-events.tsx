import { useInfiniteQuery } from '@tanstack/react-query'
import type { AuditEvent } from '#shared/schemas/event.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { eventQueries } from '#web/data/event/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { SheetSection } from './sheet-section.tsx'

const VERBS: Readonly<Record<string, string>> = { 'test.recorded': 'Recorded', 'test.voided': 'Voided', 'test.rejudged': 'Judged again', 'test.superseded': 'Put out of force by rework', 'file.attached': 'File added', 'file.withdrawn': 'File withdrawn' }

function eventWords({ verb, payload }: AuditEvent): string {
  const said = VERBS[verb] ?? (verb.split('.').at(-1) ?? verb)
  return typeof payload.reason === 'string' ? `${said}: ${payload.reason}` : said
}

/** Who did what to the test, and when; each line is a link of the site's audit trail. */
export function TestEvents({ testId }: { testId: string }) {
  const { site, units } = useSite()
  const events = useInfiniteQuery(eventQueries.list(site.id, { subjectType: 'test', subjectId: testId }))
  const list = events.data?.pages.flatMap((page) => page.events) ?? []
  return (
    <SheetSection title="Audit trail">
      {events.isPending && <Skeleton label="The audit trail is on its way" lines={[70, 60]} />}
      {events.error !== null && (
        <p role="alert" className="text-bad">
          {events.error.message}{' '}
          <button type="button" className="link-ink" onClick={() => void events.refetch()}>
            Try again
          </button>
        </p>
      )}
      <ol className="m-0 list-none p-0">
        {list.map((event) => (
          <li key={event.seq} className="border-b border-rule py-[6px]">
            <b className="font-semibold">{eventWords(event)}</b> by {event.actor.name}
            <span className="block text-small text-ink-2">
              {units.dateTime(event.recordedAt)}, no. {event.seq}, <span className="num">{event.hash.slice(0, 12)}</span>
            </span>
          </li>
        ))}
      </ol>
      {events.hasNextPage && (
        <Button className="mt-2 print:hidden" onClick={() => void events.fetchNextPage()} busyLabel={events.isFetchingNextPage && 'Reading'}>
          Earlier ones
        </Button>
      )}
    </SheetSection>
  )
}
