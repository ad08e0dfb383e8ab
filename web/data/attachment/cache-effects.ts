import type { QueryClient } from '@tanstack/react-query'
import type { Attachment } from '#shared/schemas/attachment.ts'
import { attachmentQueries } from '#web/data/attachment/queries.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** A photo or document was added or withdrawn. */
export function attachmentChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, attachmentQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}

/** A file of this window has arrived: it is shown at once, and read again as any change. */
export function attachmentAdded(client: QueryClient, siteId: string, attachment: Attachment): void {
  const key = attachmentQueries.list(siteId, attachment).queryKey
  client.setQueryData(key, (known) => (known === undefined || known.some(({ id }) => id === attachment.id) ? known : [...known, attachment]))
  attachmentChanged(client, siteId, { revision: null })
}
