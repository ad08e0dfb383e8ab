import { Router } from 'express'
import { z } from 'zod'
import type { Deps } from '#api/deps.ts'
import { listPlacements } from '#api/features/placements/placements.queries.ts'
import { recordPlacement } from '#api/features/placements/record-placement.service.ts'
import { voidPlacement } from '#api/features/placements/void-placement.service.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import { createPlacementSchema, groundWriteSchema, placementListSchema, voidSchema } from '#shared/schemas/placement.ts'

const querySchema = z.object({ limit: z.coerce.number().int().min(1).max(2_000).default(100) })

/** Mounted at /api/sites/:siteId. */
export function placementRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/placements',
    requireUser,
    validate({ params: siteParamsSchema, query: querySchema }, async ({ params: { siteId }, query: { limit } }, req, res) => {
      const placements = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, ({ manager }) => listPlacements(manager, siteId, limit))
      res.json(placementListSchema.parse({ placements }))
    }),
  )

  router.post(
    '/placements',
    requireUser,
    validate({ params: siteParamsSchema, body: createPlacementSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'placement.record', request: { id: body.id, body } } as const
      const answer = await writeToSite(deps, write, (site) => recordPlacement(site, body))
      res.status(201).json(groundWriteSchema.parse(answer))
    }),
  )

  router.post(
    '/placements/:id/void',
    requireUser,
    validate({ params: recordParamsSchema, body: voidSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const answer = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'placement.void' }, (site) => voidPlacement(site, id, body.reason))
      res.json(groundWriteSchema.parse(answer))
    }),
  )

  return router
}
