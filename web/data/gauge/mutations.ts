import type { QueryClient } from '@tanstack/react-query'
import { gaugeSchema, type AddCalibration, type CreateGauge, type EditGauge, type Gauge, type PutBack, type RecordCorrection, type RecordCount, type TakeOut } from '#shared/schemas/gauge.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { gaugeChanged } from './cache-effects.ts'

type OfGauge<T> = { readonly gaugeId: string } & T

const address = (siteId: string, gaugeId: string): string => `${siteAddress(siteId)}/gauges/${encodeURIComponent(gaugeId)}`
const post = (path: string, body: object): Promise<Gauge> => apiJson(path, gaugeSchema, { method: 'POST', body })
const after = (client: QueryClient, siteId: string): void => gaugeChanged(client, siteId, { revision: null })

const recordGauge = (siteId: string, input: CreateGauge) => post(`${siteAddress(siteId)}/gauges`, input)
const editGauge = (siteId: string, { gaugeId, ...body }: OfGauge<EditGauge>) => apiJson(address(siteId, gaugeId), gaugeSchema, { method: 'PATCH', body })
const addCalibration = (siteId: string, { gaugeId, ...body }: OfGauge<AddCalibration>) => post(`${address(siteId, gaugeId)}/calibrations`, body)
const recordCount = (siteId: string, { gaugeId, ...body }: OfGauge<RecordCount>) => post(`${address(siteId, gaugeId)}/counts`, body)
const voidCount = (siteId: string, { gaugeId, partId, reason }: OfGauge<{ partId: string; reason: string }>) => post(`${address(siteId, gaugeId)}/counts/${encodeURIComponent(partId)}/void`, { reason })
const takeOut = (siteId: string, { gaugeId, ...body }: OfGauge<TakeOut>) => post(`${address(siteId, gaugeId)}/take-out`, body)
const putBack = (siteId: string, { gaugeId, ...body }: OfGauge<PutBack>) => post(`${address(siteId, gaugeId)}/put-back`, body)
const recordCorrection = (siteId: string, { gaugeId, ...body }: OfGauge<RecordCorrection>) => post(`${address(siteId, gaugeId)}/corrections`, body)
const withdrawCorrection = (siteId: string, { gaugeId, partId, reason }: OfGauge<{ partId: string; reason: string }>) =>
  post(`${address(siteId, gaugeId)}/corrections/${encodeURIComponent(partId)}/withdraw`, { reason })

export const useRecordGauge = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordGauge, effects: after, words })
export const useEditGauge = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: editGauge, effects: after, words })
export const useAddCalibration = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: addCalibration, effects: after, words })
export const useRecordCount = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordCount, effects: after, words })
export const useVoidCount = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: voidCount, effects: after, words })
export const useTakeOut = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: takeOut, effects: after, words })
export const usePutBack = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: putBack, effects: after, words })
export const useRecordCorrection = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordCorrection, effects: after, words })
export const useWithdrawCorrection = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: withdrawCorrection, effects: after, words })
