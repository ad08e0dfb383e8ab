import type { QueryClient } from '@tanstack/react-query'
import { importPreviewAnswerSchema, importTestsAnswerSchema, type ImportPreview, type ImportTests, type ImportTestsAnswer, type PreviewedRow } from '#shared/schemas/test-exchange.ts'
import { orderChanged } from '#web/data/order/cache-effects.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { testChanged } from './cache-effects.ts'

/** What would become of rows of a file; nothing is stored. */
export async function previewImport(siteId: string, body: ImportPreview, signal: AbortSignal): Promise<PreviewedRow[]> {
  return (await apiJson(`${siteAddress(siteId)}/tests/import/preview`, importPreviewAnswerSchema, { method: 'POST', body, signal })).rows
}

/** Records a batch, whole or not at all; the same batch sent again gets the same answer. */
export function importTests(siteId: string, body: ImportTests): Promise<ImportTestsAnswer> {
  return apiJson(`${siteAddress(siteId)}/tests/import`, importTestsAnswerSchema, { method: 'POST', body })
}

export function afterImport(client: QueryClient, siteId: string, answer: { readonly revision: number }): void {
  testChanged(client, siteId, answer)
  orderChanged(client, siteId, answer)
}
