import { fileTypeFromBuffer } from 'file-type'
import type { AppError } from '#api/errors.ts'
import { invalid, tooLarge } from '#api/errors.ts'
import { makePhoto } from '#api/files/make-photo.ts'
import type { Photo } from '#api/files/make-photo.ts'
import { ATTACHMENT_LIMITS } from '#shared/schemas/attachment.ts'

/** What is kept of a file somebody sent. */
export type ReadUpload = ({ readonly kind: 'photo' } & Photo) | { readonly kind: 'document'; readonly body: Buffer; readonly contentType: 'application/pdf' }

const PHOTO_TYPES: readonly string[] = ['image/jpeg', 'image/png', 'image/webp', 'image/heic', 'image/heif', 'image/heic-sequence', 'image/heif-sequence']
const PDF_END_WITHIN = 2_048

const kept = 'It was not added; the others were kept.'

function wrongType(found: string | undefined): AppError {
  const content = found === undefined ? 'By its content' : `By its content (${found})`
  return invalid(`${content} this file is neither a photo nor a PDF, whatever its name says. Photos (JPEG, PNG, WebP) and PDF documents can be added. ${kept}`)
}

const megabytes = (bytes: number) => `${bytes / 1_000_000} MB`

/**
 * Looks at what a file is by its content, never by its name or the type the sender gives, and makes of it what is kept: of a
 * photo a new picture without anything of the old file but its pixels; a PDF as it came.
 * @throws AppError 400 or 413 in words for the person who sent it
 */
export async function readUpload(file: Buffer): Promise<ReadUpload> {
  const found = (await fileTypeFromBuffer(file))?.mime as string | undefined
  if (found === 'application/pdf') return { kind: 'document', body: readPdf(file), contentType: found }
  if (found === undefined || !PHOTO_TYPES.includes(found)) throw wrongType(found)
  if (file.length > ATTACHMENT_LIMITS.photoBytes) throw tooLarge(`A photo may have up to ${megabytes(ATTACHMENT_LIMITS.photoBytes)}. Send it in a smaller size. ${kept}`)
  return { kind: 'photo', ...(await makePhoto(file, found)) }
}

/** A PDF begins as one at its first byte and has its end and cross-reference where a reader looks for them (ISO 32000-1, 7.5). */
function readPdf(file: Buffer): Buffer {
  const end = file.subarray(-PDF_END_WITHIN).toString('latin1')
  if (!/^%PDF-[12]\.\d/.test(file.subarray(0, 8).toString('latin1')) || !/startxref\s+\d+\s+%%EOF/.test(end)) {
    throw invalid(`This PDF is cut short or damaged. Open it on your device, save it again and send that. ${kept}`)
  }
  return file
}

/** What a file that is too large for anything is told. */
export function fileTooLarge(): AppError {
  return tooLarge(`A document may have up to ${megabytes(ATTACHMENT_LIMITS.documentBytes)}, a photo ${megabytes(ATTACHMENT_LIMITS.photoBytes)}. ${kept}`)
}
