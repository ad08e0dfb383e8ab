import type { QueryClient } from '@tanstack/react-query'
import { calibrationSchema, type Calibration, type CreateCalibration } from '#shared/schemas/calibration.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { calibrationChanged } from './cache-effects.ts'

export type VoidCalibration = { readonly id: string; readonly reason: string }

export function recordCalibration(siteId: string, input: CreateCalibration): Promise<Calibration> {
  return apiJson(`${siteAddress(siteId)}/calibrations`, calibrationSchema, { method: 'POST', body: input })
}

export function voidCalibration(siteId: string, { id, reason }: VoidCalibration): Promise<Calibration> {
  return apiJson(`${siteAddress(siteId)}/calibrations/${encodeURIComponent(id)}/void`, calibrationSchema, { method: 'POST', body: { reason } })
}

const afterCalibration = (client: QueryClient, siteId: string): void => calibrationChanged(client, siteId, { revision: null })

export const useRecordCalibration = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordCalibration, effects: afterCalibration, words })
export const useVoidCalibration = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: voidCalibration, effects: afterCalibration, words })
