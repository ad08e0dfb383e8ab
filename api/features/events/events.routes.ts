import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { listEvents } from '#api/features/events/events.queries.ts'
import { readSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { siteParamsSchema } from '#shared/schemas/common.ts'
import { eventListSchema, eventQuerySchema } from '#shared/schemas/event.ts'

/** Mounted at /api/sites/:siteId. */
export function eventRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/events',
    requireUser,
    validate({ params: siteParamsSchema, query: eventQuerySchema }, async ({ params: { siteId }, query }, req, res) => {
      const page = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, ({ manager }) =>
        listEvents(manager, siteId, query),
      )
      res.json(eventListSchema.parse(page))
    }),
  )

  return router
}
