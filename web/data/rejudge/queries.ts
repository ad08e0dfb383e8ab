import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import { rejudgeAnswerSchema, rejudgingSchema, verdictHistorySchema } from '#shared/schemas/rejudge.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { testQueries } from '#web/data/test/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

/** Beneath the tests' key: whatever changes a test changes these. */
export const rejudgeQueries = {
  all: (siteId: string) => [...testQueries.all(siteId), 'rejudging'] as const,
  /** every test of a curve as another would judge it; `by` null: its successor */
  table: (siteId: string, curveId: string, by: string | null) =>
    queryOptions({
      queryKey: [...rejudgeQueries.all(siteId), curveId, by] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/curves/${encodeURIComponent(curveId)}/rejudging`, rejudgingSchema, { query: by === null ? {} : { by }, signal }),
      placeholderData: keepPreviousData,
    }),
  /** what judging these again would do to the ground; nothing is stored */
  rehearsal: (siteId: string, curveId: string, by: string, tests: readonly string[]) =>
    queryOptions({
      queryKey: [...rejudgeQueries.all(siteId), curveId, by, 'rehearsal', tests] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/curves/${encodeURIComponent(curveId)}/rejudging/rehearse`, rejudgeAnswerSchema, { method: 'POST', body: { by, tests }, signal }),
      enabled: tests.length > 0,
      gcTime: 60_000,
    }),
  history: (siteId: string, testId: string) =>
    queryOptions({
      queryKey: [...testQueries.all(siteId), 'verdicts', testId] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/tests/${encodeURIComponent(testId)}/verdicts`, verdictHistorySchema, { signal })).verdicts,
    }),
}
