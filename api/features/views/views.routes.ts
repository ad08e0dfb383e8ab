import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { listViews } from '#api/features/views/views.queries.ts'
import { chooseDefaultView, createView, editView, removeView } from '#api/features/views/views.service.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import { chooseDefaultViewSchema, createViewSchema, editViewSchema, savedViewListSchema, savedViewSchema } from '#shared/schemas/saved-view.ts'

/** Mounted at /api/sites/:siteId. */
export function viewRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/views',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const views = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, (site) => listViews(site.manager, siteId, site))
      res.json(savedViewListSchema.parse({ views }))
    }),
  )

  router.post(
    '/views',
    requireUser,
    validate({ params: siteParamsSchema, body: createViewSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'view.save', request: { id: body.id, body } } as const
      const view = await writeToSite(deps, write, (site) => createView(site, body))
      res.status(201).json(savedViewSchema.parse(view))
    }),
  )

  router.put(
    '/views/default',
    requireUser,
    validate({ params: siteParamsSchema, body: chooseDefaultViewSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'view.save' } as const
      const views = await writeToSite(deps, write, (site) => chooseDefaultView(site, body.viewId))
      res.json(savedViewListSchema.parse({ views }))
    }),
  )

  router.patch(
    '/views/:id',
    requireUser,
    validate({ params: recordParamsSchema, body: editViewSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'view.save' } as const
      const view = await writeToSite(deps, write, (site) => editView(site, id, body))
      res.json(savedViewSchema.parse(view))
    }),
  )

  router.delete(
    '/views/:id',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'view.save' } as const
      await writeToSite(deps, write, (site) => removeView(site, id))
      res.status(204).end()
    }),
  )

  return router
}
