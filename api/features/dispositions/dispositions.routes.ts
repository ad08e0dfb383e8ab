import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { acceptAsIs } from '#api/features/dispositions/accept-as-is.service.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { siteParamsSchema } from '#shared/schemas/common.ts'
import { createDispositionSchema, groundWriteSchema } from '#shared/schemas/placement.ts'

/** Mounted at /api/sites/:siteId. */
export function dispositionRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.post(
    '/dispositions',
    requireUser,
    validate({ params: siteParamsSchema, body: createDispositionSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'disposition.accept-as-is', request: { id: body.id, body } } as const
      const answer = await writeToSite(deps, write, (site) => acceptAsIs(site, body))
      res.status(201).json(groundWriteSchema.parse(answer))
    }),
  )

  return router
}
