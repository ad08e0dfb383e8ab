import { createHash, randomUUID } from 'node:crypto'
import sharp from 'sharp'
import type { Response } from 'supertest'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { readEnv } from '#api/env.ts'
import { verifyChain } from '#api/features/events/verify-chain.ts'
import { UPLOAD_LIMIT } from '#api/http/rate-limit.ts'
import { attachmentListSchema, attachmentSchema } from '#shared/schemas/attachment.ts'
import type { Attachment } from '#shared/schemas/attachment.ts'
import { fieldWork } from '#tests/factories/field-work.ts'
import { openSite, rowsOf } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { buildPdf, buildPicture, PHONE_EXIF } from '#tests/factories/picture.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp, Upload } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let testId: string

beforeAll(async () => {
  app = await testApp()
})

beforeEach(async () => {
  open = await openSite(app)
  testId = (await fieldWork(app, open).record()).id
})

afterAll(() => app.end())

const photo = async (options: Parameters<typeof buildPicture>[0] = {}, name = 'hole.jpg'): Promise<Upload> => ({ bytes: await buildPicture(options), name })
const fieldsOf = (fields: Partial<Record<'id' | 'subject' | 'subjectId' | 'caption', string>> = {}) => ({ id: randomUUID(), subject: 'test', subjectId: testId, caption: 'Hole before filling', ...fields })
const send = (file: Upload | null, fields: Parameters<typeof fieldsOf>[0] = {}, who: SignedIn = open.people.technician, path = open.path('/attachments')) => who.upload(path, fieldsOf(fields), file)

async function attached(file: Upload, fields: Parameters<typeof fieldsOf>[0] = {}, who: SignedIn = open.people.technician): Promise<Attachment> {
  const { status, body } = await send(file, fields, who)
  if (status !== 201) throw new Error(`Answered ${status}: ${JSON.stringify(body)}`)
  return attachmentSchema.parse(body)
}

const bytesOf = async (who: SignedIn, { id }: Attachment, part = 'file') => who.get(open.path(`/attachments/${id}/${part}`)).buffer(true).parse(collect)
const listed = async (who: SignedIn, subject = 'test', subjectId = testId) => attachmentListSchema.parse((await who.get(open.path(`/attachments?subject=${subject}&subjectId=${subjectId}`))).body).attachments
const messageOf = ({ body }: { body: unknown }) => (body as { message: string }).message
const rows = () => rowsOf(app.dataSource.manager, 'attachment', open.siteId)

function collect(res: Response, done: (error: Error | null, body: Buffer) => void): void {
  const chunks: Buffer[] = []
  res.on('data', (chunk: Buffer) => chunks.push(chunk))
  res.on('end', () => done(null, Buffer.concat(chunks)))
}

describe('POST /api/sites/:siteId/attachments', () => {
  it('is for those who record what the file belongs to', async () => {
    const file = await photo()
    expect((await app.visitor().upload(open.path('/attachments'), fieldsOf(), file)).status).toBe(401)
    expect((await send(file, {}, open.people.operator)).status).toBe(403)
    expect((await send(file, {}, open.people.superintendent)).status).toBe(403)
    expect((await send(file, {}, open.people['owner-rep'])).status).toBe(403)
    expect((await send(file, {}, await app.signedIn())).status).toBe(404)
    expect((await send(file, { subjectId: randomUUID() })).status).toBe(404)
    expect((await send(file, { subject: 'curve' })).status).toBe(404)
    expect((await send(file)).status).toBe(201)
    const verification = await fieldWork(app, open).record({ purpose: 'verification' }, 'owner-rep')
    expect((await send(file, { subjectId: verification.id })).status).toBe(403)
    expect((await send(file, { subjectId: verification.id }, open.people['owner-rep'])).status).toBe(201)
  })

  it('needs the session’s token, as every change', async () => {
    const { bytes } = await photo()
    const answer = await open.people.technician.agent.post(open.path('/attachments')).field(fieldsOf()).attach('file', bytes, 'hole.jpg')
    expect([answer.status, (answer.body as { code: string }).code]).toEqual([403, 'csrf'])
    expect(await rows()).toEqual([])
  })

  it('stores a photo upright and anew: no place, no camera, nothing of the old file', async () => {
    const sent = await buildPicture({ width: 800, height: 500, exif: PHONE_EXIF, orientation: 6 })
    expect((await sharp(sent).metadata()).exif?.includes('Phone')).toBe(true)
    const saved = await attached({ bytes: sent, name: 'IMG_1.jpg' })
    // turned by a quarter: what was 800 × 500 stands upright, its red quarter at the upper right
    expect(saved).toMatchObject({ kind: 'photo', contentType: 'image/jpeg', width: 500, height: 800, fileName: 'IMG_1.jpg', takenFrom: 'camera' })
    // 10:11:12 on the site's clock, which is eight hours behind Greenwich in November
    expect(saved.takenAt).toBe('2026-11-30T18:11:12.000Z')
    const { body: stored, headers } = await bytesOf(open.people.superintendent, saved)
    const bytes = stored as Buffer
    const { exif, xmp, iptc, icc, orientation, width, height } = await sharp(bytes).metadata()
    expect({ exif, xmp, iptc, icc, orientation, width, height }).toEqual({ width: 500, height: 800 })
    expect(bytes.includes('Phone') || bytes.includes('Exif')).toBe(false)
    const { data } = await sharp(bytes).extract({ left: 400, top: 50, width: 1, height: 1 }).raw().toBuffer({ resolveWithObject: true })
    expect(data[0]).toBeGreaterThan(200)
    expect(createHash('sha256').update(bytes).digest('hex')).toBe(saved.sha256)
    expect(bytes).toHaveLength(saved.bytes)
    expect(headers).toMatchObject({ 'content-type': 'image/jpeg', 'x-content-type-options': 'nosniff', 'cache-control': 'private, no-cache', etag: `"${saved.sha256}"`, 'cross-origin-resource-policy': 'same-origin' })
    expect(headers['content-disposition']).toMatch(/^inline; filename="IMG_1.jpg"/)
    const small = await sharp((await bytesOf(open.people.technician, saved, 'thumbnail')).body as Buffer).metadata()
    expect([small.width, small.height, small.exif]).toEqual([200, 320, undefined])
  })

  it('makes large photos small, and keeps PNG and WebP as JPEG', async () => {
    expect(await attached(await photo({ width: 4000, height: 3000 }))).toMatchObject({ width: 2560, height: 1920 })
    expect(await attached(await photo({ format: 'png' }, 'plan.png'))).toMatchObject({ contentType: 'image/jpeg', fileName: 'plan.jpg', takenFrom: 'upload' })
    expect(await attached(await photo({ format: 'webp' }, 'plan'))).toMatchObject({ contentType: 'image/jpeg', fileName: 'plan.jpg' })
  })

  it('keeps a PDF as it came, and hands it out to be saved, never to be run', async () => {
    const pdf = buildPdf()
    const saved = await attached({ bytes: pdf, name: 'Отчёт № 7 “Пруд”.pdf' }, { subject: 'curve', subjectId: open.curve.id, caption: '' })
    expect(saved).toMatchObject({ kind: 'document', subject: 'curve', fileName: 'Отчёт № 7 “Пруд”.pdf', width: null, sha256: createHash('sha256').update(pdf).digest('hex') })
    const { body, headers } = await bytesOf(open.people['owner-rep'], saved)
    expect(body).toEqual(pdf)
    expect(headers['content-disposition']).toBe(`attachment; filename="_____ _ 7 ______.pdf"; filename*=UTF-8''${encodeURIComponent('Отчёт № 7 “Пруд”.pdf')}`)
    expect(headers['content-security-policy']).toBe("default-src 'none'; sandbox")
    expect((await open.people.technician.get(open.path(`/attachments/${saved.id}/thumbnail`))).status).toBe(404)
  })

  it('takes folders, unseen characters and turns of writing out of a name', async () => {
    expect((await attached(await photo({}, '..\\..\\etc\\pass\u202ewd.png'))).fileName).toBe('passwd.jpg')
    expect((await attached(await photo({}, '../../.jpg'))).fileName).toBe('jpg.jpg')
    expect((await attached(await photo({}, `${'ä'.repeat(300)}.jpg`))).fileName).toBe(`${'ä'.repeat(116)}.jpg`)
  })

  it.each([
    ['a web page', 'page.jpg', Buffer.from('<!doctype html><script>alert(1)</script>'), 'image/jpeg'],
    ['a drawing that can run', 'drawing.png', Buffer.from('<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg" onload="alert(1)"/>'), 'image/png'],
    ['an archive', 'report.pdf', Buffer.from('504b0304140000000800', 'hex'), 'application/pdf'],
    ['a program', 'photo.jpg', Buffer.concat([Buffer.from('MZ'), Buffer.alloc(200)]), 'image/jpeg'],
    ['a moving picture', 'a.jpg', Buffer.from('47494638396101000100800000000000ffffff2c00000000010001000002024401003b', 'hex'), 'image/jpeg'],
    ['nothing', 'empty.jpg', Buffer.alloc(0), 'image/jpeg'],
    ['a PDF in name only', 'a.pdf', Buffer.from('%PDF-1.7\n<script>'), 'application/pdf'],
    ['a PDF behind something else', 'a.pdf', Buffer.concat([Buffer.from('<html>'), buildPdf()]), 'application/pdf'],
    ['a broken photo', 'a.jpg', Buffer.from('ffd8ffe000104a46494600010100000100010000ffd9', 'hex'), 'image/jpeg'],
  ])('refuses %s by its content, in words, and stores nothing', async (_what, name, bytes, type) => {
    const answer = await send({ bytes, name, type })
    expect(answer.status).toBe(400)
    expect(messageOf(answer)).toMatch(/not added/)
    expect(await rows()).toEqual([])
  })

  it('says to send a JPEG where a photo is HEIC', async () => {
    const header = Buffer.concat([Buffer.from('0000001c', 'hex'), Buffer.from('ftypheic'), Buffer.from('00000000', 'hex'), Buffer.from('mif1heic'), Buffer.alloc(64)])
    const answer = await send({ bytes: header, name: 'IMG_2.HEIC' })
    expect(answer.status).toBe(400)
    expect(messageOf(answer)).toMatch(/HEIC.*Send it as a JPEG/)
  })

  it('keeps nothing that stands behind a photo’s end, such as a page or an archive', async () => {
    const saved = await attached({ bytes: Buffer.concat([await buildPicture(), Buffer.from('PK\u0003\u0004<script>alert(1)</script>')]), name: 'a.jpg' })
    const { body } = await bytesOf(open.people.technician, saved)
    expect((body as Buffer).includes('<script>')).toBe(false)
  })

  it('refuses a picture that would be enormous decoded, without decoding it', async () => {
    const bomb = await sharp({ create: { width: 12_000, height: 9_000, channels: 3, background: '#000' } }).png({ compressionLevel: 9 }).toBuffer()
    expect(bomb.length).toBeLessThan(1_000_000)
    const before = process.memoryUsage().rss
    const answer = await send({ bytes: bomb, name: 'black.png' })
    expect(answer.status).toBe(400)
    expect(messageOf(answer)).toMatch(/more than 80 million pixels/)
    expect(process.memoryUsage().rss - before).toBeLessThan(200_000_000)
  })

  it('refuses what is too large for its kind', async () => {
    const photoOf16Mb = Buffer.concat([await buildPicture(), Buffer.alloc(16_000_000)])
    const large = await send({ bytes: photoOf16Mb, name: 'a.jpg' })
    expect([large.status, messageOf(large)]).toEqual([413, 'A photo may have up to 15 MB. Send it in a smaller size. It was not added; the others were kept.'])
    const document = await send({ bytes: Buffer.concat([buildPdf(), Buffer.alloc(25_000_000)]), name: 'a.pdf' })
    expect([document.status, messageOf(document)]).toEqual([413, 'A document may have up to 25 MB, a photo 15 MB. It was not added; the others were kept.'])
    expect(await rows()).toEqual([])
  })

  it('names what is missing', async () => {
    expect((await send(null)).status).toBe(400)
    expect((await send(await photo(), { id: 'none' })).status).toBe(400)
    expect((await send(await photo(), { subject: 'site' })).status).toBe(400)
    expect((await send(await photo(), { caption: 'x'.repeat(201) })).status).toBe(400)
    expect((await open.people.technician.post(open.path('/attachments'), fieldsOf())).status).toBe(400)
  })

  it('takes a file sent twice for one, and its id used for another for a conflict', async () => {
    const fields = fieldsOf()
    const file = await photo()
    const first = await attached(file, fields)
    expect(await attached(file, fields)).toEqual(first)
    expect((await send(await photo({ width: 100 }), fields)).status).toBe(409)
    expect(await rows()).toHaveLength(1)
  })

  it('writes the hash of what is stored into the chain of events, and tells open boards', async () => {
    const socket = app.connect(open.people['owner-rep'])
    await new Promise((resolve) => socket.on('connect', () => socket.emit('site:join', open.siteId, resolve)))
    const notice = new Promise<unknown>((resolve) => socket.on('site:changed', resolve))
    const saved = await attached(await photo())
    expect(await notice).toMatchObject({ resource: 'attachment', id: saved.id })
    const { body } = await open.people['qc-lead'].get(open.path(`/events?subjectType=test&subjectId=${testId}`))
    expect((body as { events: unknown[] }).events[0]).toMatchObject({ verb: 'file.attached', payload: { attachmentId: saved.id, sha256: saved.sha256, bytes: saved.bytes } })
    expect(await verifyChain(app.dataSource.manager, open.siteId)).toMatchObject({ ok: true })
  })

  it('keeps each object under its site and a name nobody can guess', async () => {
    await attached(await photo())
    const [row] = await rows()
    expect(row?.object_key).toMatch(new RegExp(`^${open.siteId}/attachments/[0-9a-f]{32}$`))
    expect(row?.thumbnail_key).toBe(`${String(row?.object_key)}-thumbnail`)
  })
})

describe('GET /api/sites/:siteId/attachments', () => {
  it('lists the files of one record to those who see the registers', async () => {
    const first = await attached(await photo())
    await attached({ bytes: buildPdf(), name: 'a.pdf' }, { subject: 'curve', subjectId: open.curve.id })
    expect(await listed(open.people.superintendent)).toEqual([first])
    const path = open.path(`/attachments?subject=test&subjectId=${testId}`)
    expect((await app.visitor().get(path)).status).toBe(401)
    expect((await open.people.operator.get(path)).status).toBe(403)
    expect((await (await app.signedIn()).get(path)).status).toBe(404)
    expect((await open.people.technician.get(open.path('/attachments?subject=test'))).status).toBe(400)
    expect((await open.people.technician.get(open.path(`/attachments?subject=test&subjectId=${randomUUID()}`))).status).toBe(404)
  })
})

describe('GET /api/sites/:siteId/attachments/:id/file', () => {
  it('is for the people of its site alone, whatever way it is asked for', async () => {
    const saved = await attached(await photo())
    const other = await openSite(app)
    for (const part of ['file', 'thumbnail']) {
      const path = `/attachments/${saved.id}/${part}`
      expect((await app.visitor().get(open.path(path))).status).toBe(401)
      expect((await open.people.operator.get(open.path(path))).status).toBe(403)
      expect((await other.people['qc-lead'].get(open.path(path))).status).toBe(404)
      expect((await other.people['qc-lead'].get(other.path(path))).status).toBe(404)
      expect((await open.people.technician.get(open.path(path))).status).toBe(200)
    }
    const traversal = open.path(`/attachments/${encodeURIComponent(`../${open.siteId}/attachments/${saved.id}`)}/file`)
    expect((await other.people['qc-lead'].get(traversal)).status).toBe(404)
    const [row] = await rows()
    expect((await open.people.technician.get(open.path(`/attachments/${encodeURIComponent(String(row?.object_key))}/file`))).status).toBe(404)
  })

  it('answers 304 to who has it already, but only while he may see it', async () => {
    const saved = await attached(await photo())
    const path = open.path(`/attachments/${saved.id}/file`)
    const { agent, user } = open.people.superintendent
    const ask = () => agent.get(path).set('If-None-Match', `"${saved.sha256}"`)
    expect((await ask()).status).toBe(304)
    await app.dataSource.query('DELETE FROM `membership` WHERE `site_id` = ? AND `user_id` = ?', [open.siteId, user.id])
    expect((await ask()).status).toBe(404)
  })

  it('gives a part of it where one is asked for', async () => {
    const pdf = buildPdf()
    const saved = await attached({ bytes: pdf, name: 'a.pdf' })
    const ask = (range: string, more: Record<string, string> = {}) => open.people.technician.agent.get(open.path(`/attachments/${saved.id}/file`)).set({ Range: range, ...more }).buffer(true).parse(collect)
    const part = await ask('bytes=5-9')
    expect([part.status, part.headers['content-range'], part.body]).toEqual([206, `bytes 5-9/${pdf.length}`, pdf.subarray(5, 10)])
    expect((await ask('bytes=-6')).body).toEqual(pdf.subarray(-6))
    const outside = await ask('bytes=999999-')
    expect([outside.status, outside.headers['content-range']]).toEqual([416, `bytes */${pdf.length}`])
    expect((await ask('bytes=0-1,5-6')).status).toBe(200)
    expect((await ask('bytes=0-1', { 'If-Range': '"another"' })).status).toBe(200)
  })
})

describe('a server whose store for files is away', () => {
  it.each([
    ['is not set', { S3_ENDPOINT: '' }, /S3_ENDPOINT is not set/],
    ['does not answer', { S3_ENDPOINT: 'http://127.0.0.1:1' }, /cannot be reached/],
  ])('says so where it %s, writes nothing down, and works on', async (_how, settings, words) => {
    const saved = await attached(await photo())
    const away = await testApp(settings)
    try {
      const lead = away.visitor()
      await lead.signIn(open.people['qc-lead'].user.email)
      const answer = await lead.upload(open.path('/attachments'), fieldsOf(), await photo())
      expect([answer.status, messageOf(answer)]).toEqual([503, expect.stringMatching(words)])
      const asked = await lead.get(open.path(`/attachments/${saved.id}/file`))
      expect([asked.status, asked.type]).toEqual([503, 'application/json'])
      expect(asked.headers.etag).not.toContain(saved.sha256)
      expect((await lead.get(open.path(`/attachments?subject=test&subjectId=${testId}`))).status).toBe(200)
      expect(await rows()).toHaveLength(1)
    } finally {
      await away.close()
    }
  })

  it('does not start with half of the settings, and says which are missing', () => {
    const given = { DATABASE_URL: 'mysql://a:b@127.0.0.1/c', SESSION_SECRET: 'x'.repeat(32), S3_ENDPOINT: 'https://files.example', S3_BUCKET: 'site' }
    expect(() => readEnv(given)).toThrow(/S3_ACCESS_KEY: must be set with S3_ENDPOINT\n {2}S3_SECRET_KEY: must be set/)
  })
})

describe('sending very many files', () => {
  it('is slowed down for that person alone', async () => {
    const path = open.path('/attachments')
    const send = () => open.people.technician.post(path, {})
    for (let count = 0; count < UPLOAD_LIMIT; count += 20) await Promise.all(Array.from({ length: 20 }, send))
    expect((await send()).status).toBe(429)
    expect((await open.people['qc-lead'].post(path, {})).status).toBe(400)
  })
})

describe('POST /api/sites/:siteId/attachments/:id/withdraw', () => {
  it('takes a file out of everybody’s sight but the lead’s, with its reason, and keeps it', async () => {
    const saved = await attached(await photo())
    const path = open.path(`/attachments/${saved.id}/withdraw`)
    const body = { reason: 'Another test’s hole' }
    expect((await app.visitor().post(path, body)).status).toBe(401)
    expect((await open.people.technician.post(path, body)).status).toBe(403)
    expect((await open.people['owner-rep'].post(path, body)).status).toBe(403)
    expect((await open.people['qc-lead'].post(path, { reason: '' })).status).toBe(400)
    expect((await open.people['qc-lead'].post(open.path(`/attachments/${randomUUID()}/withdraw`), body)).status).toBe(404)
    const answer = await open.people['qc-lead'].post(path, body)
    expect(answer.status).toBe(200)
    expect((await open.people['qc-lead'].post(path, body)).status).toBe(409)
    expect(await listed(open.people.technician)).toEqual([])
    expect((await listed(open.people['qc-lead']))[0]?.withdrawn).toMatchObject({ reason: body.reason, by: open.people['qc-lead'].user.name })
    for (const part of ['file', 'thumbnail']) {
      expect((await open.people.technician.get(open.path(`/attachments/${saved.id}/${part}`))).status).toBe(404)
      expect((await open.people['qc-lead'].get(open.path(`/attachments/${saved.id}/${part}`))).status).toBe(200)
    }
    expect(await rows()).toHaveLength(1)
  })

  it('is the owner’s on a verification test', async () => {
    const verification = await fieldWork(app, open).record({ purpose: 'verification' }, 'owner-rep')
    const owner = open.people['owner-rep']
    const saved = await attached(await photo(), { subjectId: verification.id }, owner)
    const path = open.path(`/attachments/${saved.id}/withdraw`)
    expect((await open.people['qc-lead'].post(path, { reason: 'Not ours to take away' })).status).toBe(403)
    expect((await owner.post(path, { reason: 'Taken twice' })).status).toBe(200)
    expect(await listed(owner, 'test', verification.id)).toEqual([])
    expect(await listed(open.people['qc-lead'], 'test', verification.id)).toHaveLength(1)
  })
})
