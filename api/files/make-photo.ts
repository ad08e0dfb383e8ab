import sharp from 'sharp'
import { invalid } from '#api/errors.ts'
import { readExifTime } from '#api/files/exif-time.ts'
import type { ExifTime } from '#api/files/exif-time.ts'
import { createTurns } from '#api/files/turns.ts'
import { PHOTO_SIDES } from '#shared/schemas/attachment.ts'

export interface Photo {
  readonly body: Buffer
  readonly contentType: 'image/jpeg'
  readonly thumbnail: Buffer
  readonly width: number
  readonly height: number
  readonly taken: ExifTime | null
}

/** A picture of more pixels is not decoded: 80 million take 320 MB while it is turned upright. */
export const MOST_PIXELS = 80_000_000
const DECODE_WITHIN_S = 20
/** Pictures decoded at a time, whatever arrives. */
const inTurn = createTurns(2)

sharp.cache(false)

const open = (file: Buffer) => sharp(file, { limitInputPixels: MOST_PIXELS, failOn: 'error', pages: 1 })

/**
 * Draws a photo anew: upright, at most 2,560 pixels long, JPEG, sRGB. Nothing else of the file stays: no place, no camera, no
 * hidden preview, nothing appended. Its time is read before.
 * @throws AppError 400 when it cannot be decoded, or would be too large decoded
 */
export function makePhoto(file: Buffer, type: string): Promise<Photo> {
  return inTurn(async () => {
    try {
      const { exif, width: across, height: down } = await open(file).metadata()
      if (across * down > MOST_PIXELS) throw tooManyPixels()
      const upright = open(file).timeout({ seconds: DECODE_WITHIN_S }).autoOrient().flatten({ background: '#ffffff' }).toColourspace('srgb')
      const { data: body, info } = await upright.clone().resize({ width: PHOTO_SIDES.full, height: PHOTO_SIDES.full, fit: 'inside', withoutEnlargement: true }).jpeg({ quality: 82, progressive: true }).toBuffer({ resolveWithObject: true })
      const small = { width: PHOTO_SIDES.thumbnail, height: PHOTO_SIDES.thumbnail, fit: 'inside', withoutEnlargement: true } as const
      const thumbnail = await sharp(body).resize(small).jpeg({ quality: 74 }).toBuffer()
      return { body, contentType: 'image/jpeg', thumbnail, width: info.width, height: info.height, taken: exif ? readExifTime(exif) : null }
    } catch (error) {
      throw undecodable(error, type)
    }
  })
}

const tooManyPixels = () => new Error('Input image exceeds pixel limit')

function undecodable(error: unknown, type: string): Error {
  const words = error instanceof Error ? error.message : ''
  if (words.includes('pixel limit')) {
    return invalid(`This picture has more than ${MOST_PIXELS / 1_000_000} million pixels. Send it in a smaller size. It was not added; the others were kept.`)
  }
  if (/hei[cf]/.test(type)) {
    return invalid('Photos in the HEIC format cannot be read here. Send it as a JPEG; most phones take those when their camera is set to the most compatible format. It was not added; the others were kept.')
  }
  return invalid('This picture is damaged and cannot be read. Take it again, or send another copy. It was not added; the others were kept.')
}
