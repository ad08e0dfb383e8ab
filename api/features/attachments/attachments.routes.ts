import { Router } from 'express'
import type { RequestHandler } from 'express'
import type { Deps } from '#api/deps.ts'
import { invalid, notFound } from '#api/errors.ts'
import { findAttachment, listAttachments } from '#api/features/attachments/attachments.queries.ts'
import { attachFile, withdrawFile } from '#api/features/attachments/attachments.service.ts'
import { sendObject } from '#api/features/attachments/send-object.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { limitUploads } from '#api/http/rate-limit.ts'
import { receiveFile } from '#api/http/receive-file.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { attachmentListSchema, attachmentQuerySchema, attachmentSchema, createAttachmentSchema, withdrawAttachmentSchema } from '#shared/schemas/attachment.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'

/** Mounted at /api/sites/:siteId. */
export function attachmentRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  /** Nothing is taken in from who may add no file at all. */
  const mayAttach: RequestHandler<{ siteId: string }> = async (req, _res, next) => {
    await readSite(deps, { siteId: req.params.siteId, userId: userOf(req).id, verb: 'file.attach' }, () => Promise.resolve())
    next()
  }

  router.get(
    '/attachments',
    requireUser,
    validate({ params: siteParamsSchema, query: attachmentQuerySchema }, async ({ params: { siteId }, query }, req, res) => {
      const attachments = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, (read) => listAttachments(read, query))
      res.json(attachmentListSchema.parse({ attachments }))
    }),
  )

  router.post(
    '/attachments',
    requireUser,
    mayAttach,
    limitUploads(),
    receiveFile,
    validate({ params: siteParamsSchema, body: createAttachmentSchema }, async ({ params: { siteId }, body: input }, req, res) => {
      if (!req.file) throw invalid('There is no file in this. Choose one and send it again.')
      const file = { bytes: req.file.buffer, name: req.file.originalname }
      res.status(201).json(attachmentSchema.parse(await attachFile(deps, { siteId, userId: userOf(req).id, input, file })))
    }),
  )

  router.get(
    '/attachments/:id/file',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const { objectKey: key, sha256: etag, kind, ...file } = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, (read) => findAttachment(read, id))
      await sendObject(deps.objects, { key, etag, bytes: file.bytes, contentType: file.contentType, fileName: file.fileName, inline: kind === 'photo' }, req, res)
    }),
  )

  router.get(
    '/attachments/:id/thumbnail',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const { thumbnailKey: key, sha256, contentType, fileName } = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, (read) => findAttachment(read, id))
      if (key === null) throw notFound('A document has no picture. Open the file itself.')
      await sendObject(deps.objects, { key, etag: `${sha256}-thumbnail`, bytes: null, contentType, fileName, inline: true }, req, res)
    }),
  )

  router.post(
    '/attachments/:id/withdraw',
    requireUser,
    validate({ params: recordParamsSchema, body: withdrawAttachmentSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, verb: 'file.withdraw' } as const
      res.json(attachmentSchema.parse(await writeToSite(deps, write, (site) => withdrawFile(site, id, body.reason))))
    }),
  )

  return router
}
