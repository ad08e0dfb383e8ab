import fc from 'fast-check'
import sharp from 'sharp'
import { expect, test } from 'vitest'
import { takenAtOf } from '#api/features/attachments/taken-at.ts'
import { readExifTime } from '#api/files/exif-time.ts'
import { buildPicture } from '#tests/factories/picture.ts'

/** A block of Exif data as libexif writes it, which sharp uses. */
async function blockOf(fields: Record<string, string>): Promise<Uint8Array> {
  const { exif } = await sharp(await buildPicture({ exif: { IFD0: { Make: 'Phone' }, IFD2: fields } })).metadata()
  return exif ?? new Uint8Array()
}

test('reads what another program wrote: the time, and the offset where there is one', async () => {
  expect(readExifTime(await blockOf({ DateTimeOriginal: '2026:11:30 10:11:12' }))).toEqual({ local: '2026-11-30T10:11:12', offset: null })
  expect(readExifTime(await blockOf({ DateTimeOriginal: '2026:11:30 10:11:12', OffsetTimeOriginal: '+05:30' }))).toEqual({ local: '2026-11-30T10:11:12', offset: '+05:30' })
  expect(readExifTime(await blockOf({ LensModel: 'wide' }))).toBeNull()
})

test('reads both orders of bytes', () => {
  // TIFF 6.0, section 2, in big-endian order: one folder with the Exif folder, that with DateTimeOriginal
  const words = '4d4d002a 00000008 0001 8769 0004 00000001 0000001a 00000000 0001 9003 0002 00000014 0000002c 00000000'.replaceAll(' ', '')
  const block = Buffer.concat([Buffer.from(words, 'hex'), Buffer.from('2026:01:02 03:04:05\0')])
  expect(readExifTime(block)).toEqual({ local: '2026-01-02T03:04:05', offset: null })
})

test('survives any damage: it never throws and never reads outside', async () => {
  const whole = await blockOf({ DateTimeOriginal: '2026:11:30 10:11:12', OffsetTimeOriginal: '-08:00' })
  fc.assert(
    fc.property(fc.array(fc.tuple(fc.nat(whole.length - 1), fc.nat(255)), { maxLength: 8 }), fc.nat(whole.length), (changes, length) => {
      const damaged = Uint8Array.from(whole)
      for (const [at, byte] of changes) damaged[at] = byte
      const found = readExifTime(damaged.subarray(0, length))
      expect(found === null || /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d$/.test(found.local)).toBe(true)
    }),
  )
  fc.assert(fc.property(fc.uint8Array({ maxLength: 200 }), (bytes) => void readExifTime(bytes)))
})

test('a camera’s time counts on its own offset or the site’s clock, unless it cannot be right', () => {
  const now = new Date('2026-12-01T22:00:00Z')
  const at = (local: string, offset: string | null = null) => takenAtOf({ local, offset }, now, 'America/Los_Angeles')
  expect(at('2026-07-01T12:00:00').takenAt.toISOString()).toBe('2026-07-01T19:00:00.000Z')
  expect(at('2026-07-01T12:00:00', '+00:00').takenAt.toISOString()).toBe('2026-07-01T12:00:00.000Z')
  for (const odd of ['1980-01-01T00:00:00', '2027-01-01T00:00:00', '2026-13-45T99:00:00', '0000-00-00T00:00:00']) expect(at(odd)).toEqual({ takenAt: now, takenFrom: 'upload' })
  expect(takenAtOf(null, now, 'America/Los_Angeles')).toEqual({ takenAt: now, takenFrom: 'upload' })
})
