/** Times are shown as given: the caller writes them in the site's own zone. */
export type Connection =
  | { readonly state: 'live'; readonly asOf: string }
  | { readonly state: 'catching-up' }
  | { readonly state: 'offline'; readonly since: string }

function wordsOf(connection: Connection): string {
  if (connection.state === 'live') return `Live, as of ${connection.asOf}`
  return connection.state === 'offline' ? `Offline since ${connection.since}` : 'Catching up'
}

/** Whether what is on screen is what stands on the server, and since when not. */
export function LiveMark({ connection }: { connection: Connection }) {
  const live = connection.state === 'live'
  return (
    <span className="flex items-center gap-2 text-small whitespace-nowrap text-ink-2">
      <svg aria-hidden width="12" height="12" viewBox="0 0 12 12">
        {live ? (
          <circle cx="6" cy="6" r="4.5" fill="var(--g-released)" stroke="var(--g-meets-spec)" strokeWidth="2" />
        ) : (
          <rect x="1.5" y="1.5" width="9" height="9" fill="none" stroke="var(--warn)" strokeWidth="2" />
        )}
      </svg>
      <span className="max-sm:sr-only">{wordsOf(connection)}</span>
    </span>
  )
}
