import { Router } from 'express'
import { z } from 'zod'
import type { Deps } from '#api/deps.ts'
import { recordCorrection, recordCount, voidCount, withdrawCorrection } from '#api/features/gauges/gauge-records.service.ts'
import { listGauges, loadGaugeDetail } from '#api/features/gauges/gauges.queries.ts'
import { addCalibration, createGauge, editGauge, putBack, takeOut } from '#api/features/gauges/gauges.service.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import {
  addCalibrationSchema,
  createGaugeSchema,
  editGaugeSchema,
  gaugeDetailSchema,
  gaugeListSchema,
  gaugeQuerySchema,
  gaugeSchema,
  putBackSchema,
  recordCorrectionSchema,
  recordCountSchema,
  takeOutSchema,
  voidCountSchema,
  withdrawCorrectionSchema,
} from '#shared/schemas/gauge.ts'
import type { Gauge } from '#shared/schemas/gauge.ts'

const partParamsSchema = recordParamsSchema.extend({ partId: z.string() })

/** Mounted at /api/sites/:siteId. */
export function gaugeRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })
  const read = (siteId: string, userId: string) => ({ siteId, userId, verb: 'registers.see' }) as const

  router.get(
    '/gauges',
    requireUser,
    validate({ params: siteParamsSchema, query: gaugeQuerySchema }, async ({ params: { siteId }, query: { at } }, req, res) => {
      const gauges = await readSite(deps, read(siteId, userOf(req).id), ({ manager, now }) => listGauges(manager, siteId, at === undefined ? now : new Date(at)))
      res.json(gaugeListSchema.parse({ gauges }))
    }),
  )

  router.get(
    '/gauges/:id',
    requireUser,
    validate({ params: recordParamsSchema, query: gaugeQuerySchema }, async ({ params: { siteId, id }, query: { at } }, req, res) => {
      const gauge = await readSite(deps, read(siteId, userOf(req).id), ({ manager, now }) => loadGaugeDetail(manager, siteId, id, at === undefined ? now : new Date(at)))
      res.json(gaugeDetailSchema.parse(gauge))
    }),
  )

  router.post(
    '/gauges',
    requireUser,
    validate({ params: siteParamsSchema, body: createGaugeSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'gauge.record', request: { id: body.id, body } } as const
      const gauge = await writeToSite(deps, write, (site) => createGauge(site, body))
      res.status(201).json(gaugeSchema.parse(gauge))
    }),
  )

  /** A record kept beneath a gauge: its own id makes a resend harmless. */
  const keep = <T extends { id: string }>(path: string, schema: z.ZodType<T>, work: (site: SiteWrite, gaugeId: string, body: T) => Promise<Gauge>): void => {
    router.post(
      `/gauges/:id/${path}`,
      requireUser,
      validate({ params: recordParamsSchema, body: schema }, async ({ params: { siteId, id }, body }, req, res) => {
        const write = { siteId, userId: userOf(req).id, verb: 'gauge.record', request: { id: body.id, body: { gaugeId: id, ...body } } } as const
        res.status(201).json(gaugeSchema.parse(await writeToSite(deps, write, (site) => work(site, id, body))))
      }),
    )
  }
  keep('calibrations', addCalibrationSchema, addCalibration)
  keep('counts', recordCountSchema, recordCount)
  keep('take-out', takeOutSchema, takeOut)
  keep('corrections', recordCorrectionSchema, recordCorrection)

  router.patch(
    '/gauges/:id',
    requireUser,
    validate({ params: recordParamsSchema, body: editGaugeSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const gauge = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'gauge.record' }, (site) => editGauge(site, id, body))
      res.json(gaugeSchema.parse(gauge))
    }),
  )

  router.post(
    '/gauges/:id/put-back',
    requireUser,
    validate({ params: recordParamsSchema, body: putBackSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const gauge = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'gauge.record' }, (site) => putBack(site, id, body))
      res.json(gaugeSchema.parse(gauge))
    }),
  )

  router.post(
    '/gauges/:id/counts/:partId/void',
    requireUser,
    validate({ params: partParamsSchema, body: voidCountSchema }, async ({ params: { siteId, id, partId }, body }, req, res) => {
      const gauge = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'gauge.record' }, (site) => voidCount(site, id, partId, body.reason))
      res.json(gaugeSchema.parse(gauge))
    }),
  )

  router.post(
    '/gauges/:id/corrections/:partId/withdraw',
    requireUser,
    validate({ params: partParamsSchema, body: withdrawCorrectionSchema }, async ({ params: { siteId, id, partId }, body }, req, res) => {
      const gauge = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'gauge.record' }, (site) => withdrawCorrection(site, id, partId, body.reason))
      res.json(gaugeSchema.parse(gauge))
    }),
  )

  return router
}
