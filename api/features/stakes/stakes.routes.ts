import { randomBytes } from 'node:crypto'
import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { drawStakes } from '#api/features/stakes/draw-stakes.service.ts'
import { listStakes } from '#api/features/stakes/stakes.queries.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { siteParamsSchema } from '#shared/schemas/common.ts'
import { drawStakesAnswerSchema, drawStakesSchema, stakeListSchema } from '#shared/schemas/lot.ts'

/** Mounted at /api/sites/:siteId. */
export function stakeRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/stakes',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const stakes = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, ({ manager }) => listStakes(manager, siteId))
      res.json(stakeListSchema.parse({ stakes }))
    }),
  )

  router.post(
    '/stakes/draw',
    requireUser,
    validate({ params: siteParamsSchema, body: drawStakesSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'stake.draw' as const, request: { id: body.id, body } }
      const answer = await writeToSite(deps, write, (site) => drawStakes(site, body, randomBytes(16).toString('hex')))
      res.status(201).json(drawStakesAnswerSchema.parse(answer))
    }),
  )

  return router
}
