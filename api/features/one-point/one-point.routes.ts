import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { listOnePoints } from '#api/features/one-point/one-point.queries.ts'
import { recordOnePoint, voidOnePoint } from '#api/features/one-point/one-point.service.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import { createOnePointSchema, onePointCheckSchema, onePointListSchema, voidOnePointSchema } from '#shared/schemas/one-point.ts'

/** Mounted at /api/sites/:siteId. */
export function onePointRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/one-point-checks',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const read = { siteId, userId: userOf(req).id, verb: 'registers.see' } as const
      const checks = await readSite(deps, read, ({ manager }) => listOnePoints(manager, siteId))
      res.json(onePointListSchema.parse({ checks }))
    }),
  )

  router.post(
    '/one-point-checks',
    requireUser,
    validate({ params: siteParamsSchema, body: createOnePointSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'one-point.record', request: { id: body.id, body } } as const
      res.status(201).json(onePointCheckSchema.parse(await writeToSite(deps, write, (site) => recordOnePoint(site, body))))
    }),
  )

  router.post(
    '/one-point-checks/:id/void',
    requireUser,
    validate({ params: recordParamsSchema, body: voidOnePointSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'one-point.record' } as const
      res.json(onePointCheckSchema.parse(await writeToSite(deps, write, (site) => voidOnePoint(site, id, body.reason))))
    }),
  )

  return router
}
