import { QueryClientProvider } from '@tanstack/react-query'
import { useState, type ReactNode } from 'react'
import { HatchDefs } from '#web/components/drawing/hatch-defs.tsx'
import { Toasts } from '#web/components/ui/toasts.tsx'
import { sessionQueries } from '#web/features/session/queries.ts'
import { createQueryClient } from '#web/lib/query-client.ts'

function buildClient() {
  const client = createQueryClient({ onSignedOut: () => void client.invalidateQueries({ queryKey: sessionQueries.all() }) })
  return client
}

/** What every page stands on: the cache of what was read, the hatches, the short notices. */
export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(buildClient)
  return (
    <QueryClientProvider client={client}>
      <HatchDefs />
      {children}
      <Toasts />
    </QueryClientProvider>
  )
}
