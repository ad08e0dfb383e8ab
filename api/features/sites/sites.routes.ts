import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { cellColumns } from '#api/features/sites/cell-columns.ts'
import { createSite } from '#api/features/sites/create-site.service.ts'
import { listSites, presentSite } from '#api/features/sites/site.queries.ts'
import { createSpecification, updateSite } from '#api/features/sites/site.service.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import {
  createSiteSchema,
  createSpecificationSchema,
  siteCellsSchema,
  siteListSchema,
  siteSchema,
  specificationSchema,
  updateSiteSchema,
} from '#shared/schemas/site.ts'

/** Mounted at /api. */
export function sitesRoutes(deps: Deps): Router {
  const router = Router()

  router.get(
    '/sites',
    requireUser,
    validate({}, async (_input, req, res) => {
      res.json(siteListSchema.parse({ sites: await listSites(deps, userOf(req).id) }))
    }),
  )

  router.post(
    '/sites',
    requireUser,
    validate({ body: createSiteSchema }, async ({ body }, req, res) => {
      const site = await createSite(deps, userOf(req).id, body)
      res.status(201).json(siteSchema.parse(site))
    }),
  )

  return router
}

/** Mounted at /api/sites/:siteId. */
export function siteRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const site = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, async (read) =>
        presentSite(read, (await loadSitePlan(read.manager, siteId)).cells),
      )
      res.json(siteSchema.parse(site))
    }),
  )

  router.patch(
    '/',
    requireUser,
    validate({ params: siteParamsSchema, body: updateSiteSchema }, async ({ params: { siteId }, body }, req, res) => {
      const site = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'site.setup' }, async (write) => {
        await updateSite(write, body)
        return presentSite(write, (await loadSitePlan(write.manager, siteId)).cells)
      })
      res.json(siteSchema.parse(site))
    }),
  )

  router.get(
    '/cells',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const { cells } = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, ({ manager }) =>
        loadSitePlan(manager, siteId),
      )
      const columns = cellColumns(cells)
      res.set({ ETag: `"${columns.hash}"`, 'Cache-Control': 'private, no-cache' })
      if (req.fresh) res.status(304).end()
      else res.json(siteCellsSchema.parse(columns))
    }),
  )

  router.post(
    '/zones/:id/specifications',
    requireUser,
    validate({ params: recordParamsSchema, body: createSpecificationSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'site.setup', request: { id: body.id, body: { zoneId: id, ...body } } } as const
      const specification = await writeToSite(deps, write, (site) => createSpecification(site, id, body))
      res.status(201).json(specificationSchema.parse(specification))
    }),
  )

  return router
}
