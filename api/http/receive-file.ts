import type { RequestHandler } from 'express'
import multer, { MulterError } from 'multer'
import { invalid } from '#api/errors.ts'
import { fileTooLarge } from '#api/files/read-upload.ts'
import { ATTACHMENT_LIMITS } from '#shared/schemas/attachment.ts'

const FIELDS = 8
const FIELD_BYTES = 4_096

const form = multer({
  storage: multer.memoryStorage(),
  defParamCharset: 'utf8',
  limits: { fileSize: ATTACHMENT_LIMITS.documentBytes, files: 1, fields: FIELDS, parts: FIELDS + 1, fieldSize: FIELD_BYTES, fieldNameSize: 64, headerPairs: 32 },
})
const readForm = form.single('file')

/** Takes in a multipart form of one file, named `file`, and a few short fields; req.file and req.body then hold them. */
export const receiveFile: RequestHandler = (req, res, next) => {
  if (!req.is('multipart/form-data')) {
    next(invalid('A file is sent as a multipart form. Nothing was added.'))
    return
  }
  void readForm(req, res, (error: unknown) => {
    if (error === undefined || error === null) next()
    else if (error instanceof MulterError && error.code === 'LIMIT_FILE_SIZE') next(fileTooLarge())
    else next(invalid('The file did not arrive whole, so it was not added. Send it again.'))
  })
}
