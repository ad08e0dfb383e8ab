import { groundWriteSchema, type GroundWrite } from '#shared/schemas/placement.ts'
import type { CreateRelease } from '#shared/schemas/release.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { releaseChanged } from './cache-effects.ts'

export type IssueRelease = { readonly id: string; readonly overrideReason: string | null }
export type DeclineRelease = { readonly id: string; readonly reason: string }

function act(siteId: string, id: string, name: 'issue' | 'accept' | 'decline', body: unknown): Promise<GroundWrite> {
  return apiJson(`${siteAddress(siteId)}/releases/${encodeURIComponent(id)}/${name}`, groundWriteSchema, { method: 'POST', body })
}

/** Issues a release, or asks for one where the role may only ask. */
export function createRelease(siteId: string, input: CreateRelease): Promise<GroundWrite> {
  return apiJson(`${siteAddress(siteId)}/releases`, groundWriteSchema, { method: 'POST', body: input })
}

export const issueRelease = (siteId: string, { id, overrideReason }: IssueRelease): Promise<GroundWrite> => act(siteId, id, 'issue', { overrideReason })
export const acceptRelease = (siteId: string, { id }: { readonly id: string }): Promise<GroundWrite> => act(siteId, id, 'accept', {})
export const declineRelease = (siteId: string, { id, reason }: DeclineRelease): Promise<GroundWrite> => act(siteId, id, 'decline', { reason })

export const useCreateRelease = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: createRelease, effects: releaseChanged, words })
export const useIssueRelease = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: issueRelease, effects: releaseChanged, words })
export const useAcceptRelease = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: acceptRelease, effects: releaseChanged, words })
export const useDeclineRelease = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: declineRelease, effects: releaseChanged, words })
