import { useMutation, useQueryClient } from '@tanstack/react-query'
import { signInResponseSchema, type SignInRequest } from '#shared/schemas/session.ts'
import { uploads } from '#web/data/attachment/uploads.ts'
import { apiJson, apiVoid, keepCsrfToken } from '#web/lib/api-client.ts'
import { sessionQueries } from './queries.ts'

/** Signs in; the page that asks says itself what went wrong. */
export function useSignIn() {
  const client = useQueryClient()
  return useMutation({
    meta: { saysOwnErrors: true },
    mutationFn: (request: SignInRequest) => apiJson('/api/session', signInResponseSchema, { method: 'POST', body: request }),
    onSuccess: async () => {
      keepCsrfToken(null)
      await client.fetchQuery({ ...sessionQueries.me(), staleTime: 0 })
    },
  })
}

/** Signs out and forgets everything that was read: the next person at this screen starts with nothing. */
export function useSignOut() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: () => apiVoid('/api/session', { method: 'DELETE' }),
    onSuccess: async () => {
      keepCsrfToken(null)
      uploads.clear()
      client.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== sessionQueries.all()[0] })
      await client.fetchQuery({ ...sessionQueries.me(), staleTime: 0 })
    },
  })
}
