import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import { testDetailSchema, testListSchema, testPreviewSchema, type PreviewTest } from '#shared/schemas/field-test.ts'
import { recorderListSchema, registerPageSchema, type TestQuery } from '#shared/schemas/test-register.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export type TestFilter = Partial<TestQuery>

export const testQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'tests'] as const,
  lists: (siteId: string) => [...testQueries.all(siteId), 'list'] as const,
  list: (siteId: string, filter: TestFilter = {}) =>
    queryOptions({
      queryKey: [...testQueries.lists(siteId), filter] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/tests`, testListSchema, { query: filter, signal }),
      placeholderData: keepPreviousData,
    }),
  /** A page of the register, with everything its columns can show. */
  register: (siteId: string, query: TestFilter) =>
    queryOptions({
      queryKey: [...testQueries.lists(siteId), 'register', query] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/tests`, registerPageSchema, { query, signal }),
      placeholderData: keepPreviousData,
    }),
  /** Everybody who recorded a test here. */
  recorders: (siteId: string) =>
    queryOptions({
      queryKey: [...testQueries.all(siteId), 'recorders'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/tests/recorders`, recorderListSchema, { signal })).people,
    }),
  detail: (siteId: string, id: string) =>
    queryOptions({
      queryKey: [...testQueries.all(siteId), 'detail', id] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/tests/${encodeURIComponent(id)}`, testDetailSchema, { signal }),
    }),
  /** What saving would do to the ground, while typing; null while the sheet is not complete. */
  preview: (siteId: string, input: PreviewTest | null) =>
    queryOptions({
      queryKey: [...testQueries.all(siteId), 'preview', input] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/tests/preview`, testPreviewSchema, { method: 'POST', body: input, signal }),
      enabled: input !== null,
      placeholderData: keepPreviousData,
      gcTime: 60_000,
    }),
}
