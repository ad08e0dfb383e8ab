import { memberListSchema, type Member, type MemberInput } from '#shared/schemas/member.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson, apiVoid } from '#web/lib/api-client.ts'
import { memberChanged } from './cache-effects.ts'
import { memberQueries } from './queries.ts'

/** Gives somebody with an account a role, or another role; answers everybody who belongs to the site. */
export async function setMember(siteId: string, input: MemberInput): Promise<Member[]> {
  return (await apiJson(`${siteAddress(siteId)}/members`, memberListSchema, { method: 'POST', body: input })).members
}

export function removeMember(siteId: string, { userId }: { readonly userId: string }): Promise<void> {
  return apiVoid(`${siteAddress(siteId)}/members/${encodeURIComponent(userId)}`, { method: 'DELETE' })
}

export const useSetMember = (siteId: string, words?: MutationWords) =>
  useSiteMutation({
    siteId,
    send: setMember,
    effects: (client, id, members) => {
      client.setQueryData(memberQueries.list(id).queryKey, members)
      memberChanged(client, id, { revision: null })
    },
    words,
  })

export const useRemoveMember = (siteId: string, words?: MutationWords) =>
  useSiteMutation({ siteId, send: removeMember, effects: (client, id) => memberChanged(client, id, { revision: null }), words })
