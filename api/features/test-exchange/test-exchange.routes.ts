import { Readable } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import { Router } from 'express'
import type { Response } from 'express'
import type { Deps } from '#api/deps.ts'
import { attachmentDisposition } from '#api/http/content-disposition.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteRead } from '#api/features/site-head/site-write.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { loadReferences } from '#api/features/test-exchange/exchange-references.ts'
import { exportRows } from '#api/features/test-exchange/export-rows.ts'
import { importTests } from '#api/features/test-exchange/import-tests.service.ts'
import { previewImport } from '#api/features/test-exchange/preview-import.ts'
import { fileNameOf } from '#api/features/test-exchange/provenance.ts'
import { writeCsv } from '#api/features/test-exchange/write-csv.ts'
import { writeWorkbook } from '#api/features/test-exchange/write-workbook.ts'
import { findTests } from '#api/features/tests/register.queries.ts'
import { recordsTests } from '#api/features/tests/test-rights.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { siteParamsSchema } from '#shared/schemas/common.ts'
import { importPreviewAnswerSchema, importPreviewSchema, importTestsAnswerSchema, importTestsSchema, testExportSchema, type TestExport } from '#shared/schemas/test-exchange.ts'

/** More tests than a site ever has. */
const ALL = 1_000_000

/** Mounted at /api/sites/:siteId, before the tests' own routes: /tests/export is no test. */
export function testExchangeRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/tests/export',
    requireUser,
    validate({ params: siteParamsSchema, query: testExportSchema }, async ({ params: { siteId }, query }, req, res) => {
      await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, (read) => sendTests(read, query, res))
    }),
  )

  router.post(
    '/tests/import/preview',
    requireUser,
    validate({ params: siteParamsSchema, body: importPreviewSchema }, async ({ params: { siteId }, body }, req, res) => {
      const rows = await readSite(deps, { siteId, userId: userOf(req).id, authorize: recordsTests }, (read) => previewImport(read, body))
      res.json(importPreviewAnswerSchema.parse({ rows }))
    }),
  )

  router.post(
    '/tests/import',
    requireUser,
    validate({ params: siteParamsSchema, body: importTestsSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, authorize: recordsTests, request: { id: body.id, body } }
      const answer = await writeToSite(deps, write, (site) => importTests(site, body))
      res.status(201).json(importTestsAnswerSchema.parse(answer))
    }),
  )

  return router
}

/** Sends the file while it is written, all of one moment of the site. */
async function sendTests({ manager, siteId, user, now }: SiteRead, query: TestExport, res: Response): Promise<void> {
  const plan = await loadSitePlan(manager, siteId)
  const ids = await findTests(manager, siteId, { ...query, offset: 0, limit: ALL })
  const rows = exportRows({ manager, plan, references: await loadReferences(manager, siteId), ids, units: query.units })
  const provenance = { plan, by: user.name, now, tests: ids.length, query }
  res.set({
    'Content-Type': query.format === 'csv' ? 'text/csv; charset=utf-8' : 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
    'Content-Disposition': attachmentDisposition(fileNameOf(provenance)),
    'Cache-Control': 'no-store',
    'X-Content-Type-Options': 'nosniff',
  })
  try {
    if (query.format === 'csv') await pipeline(Readable.from(writeCsv(rows, provenance)), res)
    else await writeWorkbook(res, rows, provenance)
  } catch (error) {
    if (!res.headersSent) throw error
    // half a file must not pass for a whole one
    res.destroy()
  }
}
