import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { recordInspection } from '#api/features/inspections/record-inspection.service.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { siteParamsSchema } from '#shared/schemas/common.ts'
import { createInspectionSchema, groundWriteSchema } from '#shared/schemas/placement.ts'

/** Mounted at /api/sites/:siteId. */
export function inspectionRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.post(
    '/inspections',
    requireUser,
    validate({ params: siteParamsSchema, body: createInspectionSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'inspection.record', request: { id: body.id, body } } as const
      const answer = await writeToSite(deps, write, (site) => recordInspection(site, body))
      res.status(201).json(groundWriteSchema.parse(answer))
    }),
  )

  return router
}
