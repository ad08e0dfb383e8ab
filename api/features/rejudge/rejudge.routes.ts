import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { loadRejudging, loadVerdictHistory } from '#api/features/rejudge/rejudging.queries.ts'
import { rejudgesTests } from '#api/features/rejudge/rejudge-rights.ts'
import { rehearseRejudging, rejudgeTests } from '#api/features/rejudge/rejudge.service.ts'
import { supersedeCurve } from '#api/features/rejudge/supersede-curve.service.ts'
import { readSite, rehearseOnSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema } from '#shared/schemas/common.ts'
import { curveSchema } from '#shared/schemas/lab.ts'
import {
  rehearseSchema,
  rejudgeAnswerSchema,
  rejudgeSchema,
  rejudgingQuerySchema,
  rejudgingSchema,
  supersedeCurveSchema,
  verdictHistorySchema,
} from '#shared/schemas/rejudge.ts'

/** Mounted at /api/sites/:siteId. */
export function rejudgeRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.post(
    '/curves/:id/supersede',
    requireUser,
    validate({ params: recordParamsSchema, body: supersedeCurveSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'curve.supersede' } as const
      res.json(curveSchema.parse(await writeToSite(deps, write, (site) => supersedeCurve(site, id, body))))
    }),
  )

  router.get(
    '/curves/:id/rejudging',
    requireUser,
    validate({ params: recordParamsSchema, query: rejudgingQuerySchema }, async ({ params: { siteId, id }, query }, req, res) => {
      const read = { siteId, userId: userOf(req).id, verb: 'registers.see' } as const
      res.json(rejudgingSchema.parse(await readSite(deps, read, (site) => loadRejudging(site, id, query.by))))
    }),
  )

  router.post(
    '/curves/:id/rejudging/rehearse',
    requireUser,
    validate({ params: recordParamsSchema, body: rehearseSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, authorize: rejudgesTests }
      res.json(rejudgeAnswerSchema.parse(await rehearseOnSite(deps, write, (site) => rehearseRejudging(site, id, body))))
    }),
  )

  router.post(
    '/curves/:id/rejudge',
    requireUser,
    validate({ params: recordParamsSchema, body: rejudgeSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, authorize: rejudgesTests, request: { id: body.id, body } }
      res.json(rejudgeAnswerSchema.parse(await writeToSite(deps, write, (site) => rejudgeTests(site, id, body))))
    }),
  )

  router.get(
    '/tests/:id/verdicts',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const read = { siteId, userId: userOf(req).id, verb: 'registers.see' } as const
      res.json(verdictHistorySchema.parse(await readSite(deps, read, ({ manager }) => loadVerdictHistory(manager, siteId, id))))
    }),
  )

  return router
}
