import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { listRecorders, listTests } from '#api/features/tests/register.queries.ts'
import { previewTest } from '#api/features/tests/preview-test.queries.ts'
import { recordTest } from '#api/features/tests/record-test.service.ts'
import { loadTestDetail } from '#api/features/tests/test-detail.queries.ts'
import { recordsTests, voidsTests } from '#api/features/tests/test-rights.ts'
import { voidTest } from '#api/features/tests/void-test.service.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import {
  createTestSchema,
  previewTestSchema,
  recordTestAnswerSchema,
  testDetailSchema,
  testPreviewSchema,
  voidTestAnswerSchema,
  voidTestSchema,
} from '#shared/schemas/field-test.ts'
import { recorderListSchema, registerPageSchema, testQuerySchema } from '#shared/schemas/test-register.ts'

/** Mounted at /api/sites/:siteId. */
export function testRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/tests',
    requireUser,
    validate({ params: siteParamsSchema, query: testQuerySchema }, async ({ params: { siteId }, query }, req, res) => {
      const page = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, ({ manager }) => listTests(manager, siteId, query))
      res.json(registerPageSchema.parse(page))
    }),
  )

  router.get(
    '/tests/recorders',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const people = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, ({ manager }) => listRecorders(manager, siteId))
      res.json(recorderListSchema.parse({ people }))
    }),
  )

  router.post(
    '/tests',
    requireUser,
    validate({ params: siteParamsSchema, body: createTestSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, authorize: recordsTests, request: { id: body.id, body } }
      const answer = await writeToSite(deps, write, (site) => recordTest(site, body))
      res.status(201).json(recordTestAnswerSchema.parse(answer))
    }),
  )

  router.post(
    '/tests/preview',
    requireUser,
    validate({ params: siteParamsSchema, body: previewTestSchema }, async ({ params: { siteId }, body }, req, res) => {
      const preview = await readSite(deps, { siteId, userId: userOf(req).id, authorize: recordsTests }, (site) => previewTest(site, body))
      res.json(testPreviewSchema.parse(preview))
    }),
  )

  router.get(
    '/tests/:id',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const detail = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, ({ manager }) => loadTestDetail(manager, siteId, id))
      res.json(testDetailSchema.parse(detail))
    }),
  )

  router.post(
    '/tests/:id/void',
    requireUser,
    validate({ params: recordParamsSchema, body: voidTestSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, authorize: voidsTests }
      const answer = await writeToSite(deps, write, (site) => voidTest(site, id, body))
      res.json(voidTestAnswerSchema.parse(answer))
    }),
  )

  return router
}
