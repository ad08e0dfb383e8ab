import { useQuery } from '@tanstack/react-query'
import type { SessionUser } from '#shared/schemas/session.ts'
import { sessionQueries } from './queries.ts'

/** Who is signed in; null until it is known and when nobody is. */
export function useMe(): SessionUser | null {
  return useQuery(sessionQueries.me()).data?.user ?? null
}
