import { randomBytes } from 'node:crypto'
import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { notFound } from '#api/errors.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { stepsOrders } from '#api/features/rework/order-rights.ts'
import { findOrder, listOrders } from '#api/features/rework/orders.queries.ts'
import { createOrder, editOrder, withdrawByLead } from '#api/features/rework/rework.service.ts'
import { stepOrder } from '#api/features/rework/step-order.service.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import { groundWriteSchema } from '#shared/schemas/placement.ts'
import { createOrderSchema, editOrderSchema, orderListSchema, orderSchema, orderStepInputSchema, stepAnswerSchema, withdrawOrderSchema } from '#shared/schemas/rework.ts'

/** Mounted at /api/sites/:siteId. */
export function reworkRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/rework',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const orders = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, async ({ manager }) => listOrders(manager, await loadSitePlan(manager, siteId)))
      res.json(orderListSchema.parse({ orders }))
    }),
  )

  router.get(
    '/rework/:id',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const order = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, async ({ manager }) => findOrder(manager, await loadSitePlan(manager, siteId), id))
      if (!order) throw notFound()
      res.json(orderSchema.parse(order))
    }),
  )

  router.post(
    '/rework',
    requireUser,
    validate({ params: siteParamsSchema, body: createOrderSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'rework.issue', request: { id: body.id, body } } as const
      const answer = await writeToSite(deps, write, (site) => createOrder(site, body))
      res.status(201).json(groundWriteSchema.parse(answer))
    }),
  )

  router.patch(
    '/rework/:id',
    requireUser,
    validate({ params: recordParamsSchema, body: editOrderSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const answer = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'rework.edit' }, (site) => editOrder(site, id, body.cells, body.reason))
      res.json(groundWriteSchema.parse(answer))
    }),
  )

  router.post(
    '/rework/:id/steps',
    requireUser,
    validate({ params: recordParamsSchema, body: orderStepInputSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const seed = randomBytes(16).toString('hex')
      const write = { siteId, userId: userOf(req).id, authorize: stepsOrders, request: { id: body.id, body: { order: id, ...body } } }
      const answer = await writeToSite(deps, write, (site) => stepOrder(site, id, body, seed))
      res.status(201).json(stepAnswerSchema.parse(answer))
    }),
  )

  router.post(
    '/rework/:id/withdraw',
    requireUser,
    validate({ params: recordParamsSchema, body: withdrawOrderSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const answer = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'rework.close' }, (site) => withdrawByLead(site, id, body.reason))
      res.json(groundWriteSchema.parse(answer))
    }),
  )

  return router
}
