import { Router } from 'express'
import { z } from 'zod'
import type { Deps } from '#api/deps.ts'
import { loadBoard } from '#api/features/ground/board.queries.ts'
import { loadColumn } from '#api/features/ground/column.queries.ts'
import { loadPatchesSince, loadSheet } from '#api/features/ground/sheet.queries.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { readSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { siteParamsSchema } from '#shared/schemas/common.ts'
import { boardSchema, columnSchema, groundQuerySchema, patchesQuerySchema, patchesSchema } from '#shared/schemas/ground.ts'

const columnParamsSchema = siteParamsSchema.extend({ cell: z.coerce.number().int().min(0) })

/** Mounted at /api/sites/:siteId. */
export function groundRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/ground',
    requireUser,
    validate({ params: siteParamsSchema, query: groundQuerySchema }, async ({ params: { siteId }, query: { cut } }, req, res) => {
      const sheet = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, async ({ manager, revision }) => {
        const plan = await loadSitePlan(manager, siteId)
        return loadSheet(manager, plan, cut === 'surface' ? { kind: 'surface' } : { kind: 'elevation', um: Number(cut) }, revision)
      })
      res.set('Cache-Control', 'no-store').type('application/octet-stream').send(Buffer.from(sheet))
    }),
  )

  router.get(
    '/ground/patches',
    requireUser,
    validate({ params: siteParamsSchema, query: patchesQuerySchema }, async ({ params: { siteId }, query: { since } }, req, res) => {
      const patches = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, ({ manager }) => loadPatchesSince(manager, siteId, since))
      res.set('Cache-Control', 'no-store').json(patchesSchema.parse(patches))
    }),
  )

  router.get(
    '/board',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const board = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, async ({ manager, now, revision }) =>
        loadBoard(manager, await loadSitePlan(manager, siteId), now, revision),
      )
      res.json(boardSchema.parse(board))
    }),
  )

  router.get(
    '/columns/:cell',
    requireUser,
    validate({ params: columnParamsSchema }, async ({ params: { siteId, cell } }, req, res) => {
      const column = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, async ({ manager, revision }) =>
        loadColumn(manager, await loadSitePlan(manager, siteId), cell, revision),
      )
      res.json(columnSchema.parse(column))
    }),
  )

  return router
}
