import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { listCurves, loadCurve } from '#api/features/lab/curves.queries.ts'
import { approveCurve, correctCurve, createCurve, withdrawCurve } from '#api/features/lab/curves.service.ts'
import { listMaterials } from '#api/features/lab/materials.queries.ts'
import { createMaterial, updateMaterial } from '#api/features/lab/materials.service.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import {
  approveCurveSchema,
  correctCurveSchema,
  createCurveSchema,
  createMaterialSchema,
  curveListSchema,
  curveSchema,
  materialListSchema,
  materialSchema,
  updateMaterialSchema,
  withdrawCurveSchema,
} from '#shared/schemas/lab.ts'

/** Mounted at /api/sites/:siteId. */
export function labRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/materials',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const read = { siteId, userId: userOf(req).id, verb: 'registers.see' } as const
      const materials = await readSite(deps, read, ({ manager }) => listMaterials(manager, siteId))
      res.json(materialListSchema.parse({ materials }))
    }),
  )

  router.post(
    '/materials',
    requireUser,
    validate({ params: siteParamsSchema, body: createMaterialSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'material.record', request: { id: body.id, body } } as const
      const material = await writeToSite(deps, write, (site) => createMaterial(site, body))
      res.status(201).json(materialSchema.parse(material))
    }),
  )

  router.patch(
    '/materials/:id',
    requireUser,
    validate({ params: recordParamsSchema, body: updateMaterialSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'material.record' } as const
      res.json(materialSchema.parse(await writeToSite(deps, write, (site) => updateMaterial(site, id, body))))
    }),
  )

  router.get(
    '/curves',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const read = { siteId, userId: userOf(req).id, verb: 'registers.see' } as const
      const curves = await readSite(deps, read, ({ manager }) => listCurves(manager, siteId))
      res.json(curveListSchema.parse({ curves }))
    }),
  )

  router.post(
    '/curves',
    requireUser,
    validate({ params: siteParamsSchema, body: createCurveSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'curve.record', request: { id: body.id, body } } as const
      const curve = await writeToSite(deps, write, (site) => createCurve(site, body))
      res.status(201).json(curveSchema.parse(curve))
    }),
  )

  router.get(
    '/curves/:id',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const read = { siteId, userId: userOf(req).id, verb: 'registers.see' } as const
      const curve = await readSite(deps, read, ({ manager }) => loadCurve(manager, siteId, id))
      res.json(curveSchema.parse(curve))
    }),
  )

  router.put(
    '/curves/:id',
    requireUser,
    validate({ params: recordParamsSchema, body: correctCurveSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'curve.record' } as const
      res.json(curveSchema.parse(await writeToSite(deps, write, (site) => correctCurve(site, id, body))))
    }),
  )

  router.post(
    '/curves/:id/withdraw',
    requireUser,
    validate({ params: recordParamsSchema, body: withdrawCurveSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'curve.record' } as const
      res.json(curveSchema.parse(await writeToSite(deps, write, (site) => withdrawCurve(site, id, body.reason))))
    }),
  )

  router.post(
    '/curves/:id/approve',
    requireUser,
    validate({ params: recordParamsSchema, body: approveCurveSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'curve.approve' } as const
      const curve = await writeToSite(deps, write, (site) => approveCurve(site, id, body.use))
      res.json(curveSchema.parse(curve))
    }),
  )

  return router
}
