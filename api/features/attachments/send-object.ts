import { pipeline } from 'node:stream/promises'
import type { Request, Response } from 'express'
import type { ByteRange, ObjectStore } from '#api/files/object-store.ts'
import { attachmentDisposition } from '#api/http/content-disposition.ts'

export interface SentObject {
  readonly key: string
  /** of the stored bytes, or what else stands for them for good */
  readonly etag: string
  /** null where it is not known beforehand: then no part can be asked for */
  readonly bytes: number | null
  readonly contentType: string
  readonly fileName: string
  /** shown in the page; a document is only ever saved */
  readonly inline: boolean
}

/**
 * Sends a stored file to one who may see it. Kept by his browser alone, and asked about at every use, so that who may not see
 * it any more does not. A part of it, when asked for (RFC 9110, 14.2).
 */
export async function sendObject(objects: ObjectStore, file: SentObject, req: Request, res: Response): Promise<void> {
  const etag = `"${file.etag}"`
  res.set({ 'Cache-Control': 'private, no-cache', ETag: etag })
  if (req.fresh) {
    res.status(304).end()
    return
  }
  const range = askedRange(req, file.bytes, etag)
  if (range === 'outside') {
    res.status(416).set('Content-Range', `bytes */${file.bytes}`).end()
    return
  }
  const body = await objects.get(file.key, range ?? undefined).catch((error: unknown) => {
    res.removeHeader('ETag')
    throw error
  })
  res.set({
    'Content-Type': file.contentType,
    'Content-Disposition': disposition(file),
    'Content-Security-Policy': "default-src 'none'; sandbox",
    'X-Content-Type-Options': 'nosniff',
    'Accept-Ranges': file.bytes === null ? 'none' : 'bytes',
  })
  if (range) res.status(206).set('Content-Range', `bytes ${range.start}-${range.end}/${file.bytes}`)
  if (file.bytes !== null) res.set('Content-Length', String(range ? range.end - range.start + 1 : file.bytes))
  await pipeline(body, res).catch((error: unknown) => {
    // the reader went away, or the store did after its first bytes: there is nobody left to tell
    if (!res.headersSent) throw error
  })
}

function disposition({ inline, fileName }: SentObject): string {
  const saved = attachmentDisposition(fileName)
  return inline ? saved.replace(/^attachment/, 'inline') : saved
}

/** The one range asked for; null for the whole file, as also for several ranges and for a copy that is no longer this one. */
function askedRange(req: Request, bytes: number | null, etag: string): ByteRange | 'outside' | null {
  const condition = req.get('if-range')
  if (bytes === null || (condition !== undefined && condition !== etag)) return null
  const ranges = req.range(bytes)
  if (ranges === -1) return 'outside'
  if (ranges === undefined || ranges === -2 || ranges.type !== 'bytes' || ranges.length !== 1) return null
  const [{ start, end } = { start: 0, end: bytes - 1 }] = ranges
  return { start, end }
}
