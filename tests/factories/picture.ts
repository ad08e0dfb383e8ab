import sharp from 'sharp'

type Exif = NonNullable<Parameters<ReturnType<typeof sharp>['withExif']>[0]>

interface PictureOptions {
  readonly width?: number
  readonly height?: number
  readonly format?: 'jpeg' | 'png' | 'webp'
  readonly exif?: Exif
  readonly orientation?: number
}

/** A picture whose upper left quarter is red and whose rest is blue, so that its turning can be told. */
export async function buildPicture({ width = 640, height = 400, format = 'jpeg', exif, orientation }: PictureOptions = {}): Promise<Buffer> {
  const red = { create: { width: width >> 1, height: height >> 1, channels: 3, background: '#ff0000' } } as const
  const picture = sharp({ create: { width, height, channels: 3, background: '#0000ff' } }).composite([{ input: red, left: 0, top: 0 }])
  const marked = exif === undefined ? picture : picture.withExif(exif)
  const turned = orientation === undefined ? marked : marked.withMetadata({ orientation })
  return turned.toFormat(format).toBuffer()
}

/** Where and when, as a phone writes it: on a beach far away. */
export const PHONE_EXIF: Exif = {
  IFD0: { Make: 'Phone', Model: 'P-1' },
  IFD2: { DateTimeOriginal: '2026:11:30 10:11:12' },
  IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '47/1 36/1 30/1', GPSLongitudeRef: 'W', GPSLongitude: '122/1 19/1 59/1' },
}

/** A PDF of one empty page, written out by hand (ISO 32000-1, 7.5). */
export function buildPdf(): Buffer {
  const objects = ['<</Type/Catalog/Pages 2 0 R>>', '<</Type/Pages/Kids[3 0 R]/Count 1>>', '<</Type/Page/Parent 2 0 R/MediaBox[0 0 200 200]>>']
  let body = '%PDF-1.4\n'
  const places = objects.map((object, index) => {
    const place = body.length
    body += `${index + 1} 0 obj\n${object}\nendobj\n`
    return `${String(place).padStart(10, '0')} 00000 n \n`
  })
  const start = body.length
  body += `xref\n0 4\n0000000000 65535 f \n${places.join('')}trailer\n<</Size 4/Root 1 0 R>>\nstartxref\n${start}\n%%EOF\n`
  return Buffer.from(body, 'latin1')
}
