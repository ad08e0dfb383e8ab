import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { listCalibrations } from '#api/features/calibrations/calibrations.queries.ts'
import { recordCalibration, voidCalibration } from '#api/features/calibrations/calibrations.service.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { calibrationListSchema, calibrationSchema, createCalibrationSchema, voidCalibrationSchema } from '#shared/schemas/calibration.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'

/** Mounted at /api/sites/:siteId. */
export function calibrationRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/calibrations',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const read = { siteId, userId: userOf(req).id, verb: 'registers.see' } as const
      const calibrations = await readSite(deps, read, ({ manager }) => listCalibrations(manager, siteId))
      res.json(calibrationListSchema.parse({ calibrations }))
    }),
  )

  router.post(
    '/calibrations',
    requireUser,
    validate({ params: siteParamsSchema, body: createCalibrationSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'calibration.record', request: { id: body.id, body } } as const
      res.status(201).json(calibrationSchema.parse(await writeToSite(deps, write, (site) => recordCalibration(site, body))))
    }),
  )

  router.post(
    '/calibrations/:id/void',
    requireUser,
    validate({ params: recordParamsSchema, body: voidCalibrationSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'calibration.record' } as const
      res.json(calibrationSchema.parse(await writeToSite(deps, write, (site) => voidCalibration(site, id, body.reason))))
    }),
  )

  return router
}
