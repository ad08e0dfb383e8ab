import { useMutation, useQueryClient, type QueryClient, type UseMutationResult } from '@tanstack/react-query'

export type MutationWords = {
  /** The page says itself what went wrong, beside the field or the button. */
  readonly saysOwnErrors?: boolean
}

type SiteMutation<Variables, Answer> = {
  readonly siteId: string
  readonly send: (siteId: string, variables: Variables) => Promise<Answer>
  readonly effects: (client: QueryClient, siteId: string, answer: Answer, variables: Variables) => void
  readonly words?: MutationWords | undefined
}

/** A change to one site: sends it, then lets the cache know by the same functions that the socket's notices go through. */
export function useSiteMutation<Variables, Answer>({ siteId, send, effects, words }: SiteMutation<Variables, Answer>): UseMutationResult<Answer, Error, Variables> {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (variables: Variables) => send(siteId, variables),
    onSuccess: (answer, variables) => effects(client, siteId, answer, variables),
    meta: { saysOwnErrors: words?.saysOwnErrors === true },
  })
}
