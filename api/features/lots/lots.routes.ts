import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { loadFrequencySeries } from '#api/features/lots/frequency-series.queries.ts'
import { listLots, loadLotView } from '#api/features/lots/lots.queries.ts'
import { readSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import { frequencySeriesSchema, lotListSchema, lotQuerySchema, lotSchema, seriesQuerySchema } from '#shared/schemas/lot.ts'

/** Mounted at /api/sites/:siteId. */
export function lotRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/lots',
    requireUser,
    validate({ params: siteParamsSchema, query: lotQuerySchema }, async ({ params: { siteId }, query }, req, res) => {
      const lots = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, ({ manager }) => listLots(manager, siteId, query))
      res.json(lotListSchema.parse({ lots }))
    }),
  )

  router.get(
    '/lots/:id',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const lot = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, ({ manager }) => loadLotView(manager, siteId, id))
      res.json(lotSchema.parse(lot))
    }),
  )

  router.get(
    '/frequency/series',
    requireUser,
    validate({ params: siteParamsSchema, query: seriesQuerySchema }, async ({ params: { siteId }, query }, req, res) => {
      const read = { siteId, userId: userOf(req).id, verb: 'registers.see' } as const
      const series = await readSite(deps, read, ({ manager }) => loadFrequencySeries(manager, siteId, query))
      res.json(frequencySeriesSchema.parse(series))
    }),
  )

  return router
}
