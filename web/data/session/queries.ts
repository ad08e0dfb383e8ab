import { queryOptions } from '@tanstack/react-query'
import { meResponseSchema } from '#shared/schemas/session.ts'
import { apiJson, keepCsrfToken } from '#web/lib/api-client.ts'

export const sessionQueries = {
  all: () => ['session'] as const,
  me: () =>
    queryOptions({
      queryKey: [...sessionQueries.all(), 'me'] as const,
      queryFn: async ({ signal }) => {
        const me = await apiJson('/api/me', meResponseSchema, { signal })
        keepCsrfToken(me.csrfToken)
        return me
      },
      staleTime: Infinity,
    }),
}
