import { useQuery } from '@tanstack/react-query'
import { sessionQueries } from '#web/features/session/queries.ts'
import { useSignOut } from '#web/features/session/mutations.ts'

/** Who is signed in and the way out. Signing out forgets what was read; RequireUser then asks to sign in. */
export function useShellUser(): { readonly name: string; readonly signOut: () => void } {
  const { data } = useQuery(sessionQueries.me())
  const signOut = useSignOut()
  return { name: data?.user?.name ?? '', signOut: () => signOut.mutate() }
}
