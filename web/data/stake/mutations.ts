import { drawStakesAnswerSchema, type DrawStakes, type DrawStakesAnswer } from '#shared/schemas/lot.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { stakeChanged } from './cache-effects.ts'

/** Draws the places of a lot's tests by chance. */
export function drawStakes(siteId: string, input: DrawStakes): Promise<DrawStakesAnswer> {
  return apiJson(`${siteAddress(siteId)}/stakes/draw`, drawStakesAnswerSchema, { method: 'POST', body: input })
}

export const useDrawStakes = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: drawStakes, effects: stakeChanged, words })
