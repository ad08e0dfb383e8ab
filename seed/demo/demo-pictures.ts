import sharp from 'sharp'

type Scene = 'cone' | 'gauge' | 'stake' | 'crumbs'

interface PictureOptions {
  readonly scene: Scene
  /** written on the board in the picture: the test's number and place */
  readonly board: readonly [string, string]
  readonly takenAt: Date
}

const [WIDTH, HEIGHT] = [1600, 1200]
const EARTH: Readonly<Record<Scene, string>> = { cone: '#a98a5b', gauge: '#9c7d50', stake: '#b39566', crumbs: '#c2a878' }

/** A sketch of the ground at a test, plainly marked as no photograph: the demo has no real ones. */
export function drawPicture({ scene, board, takenAt }: PictureOptions): Promise<Buffer> {
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${WIDTH} ${HEIGHT}" font-family="sans-serif">
    <rect width="${WIDTH}" height="430" fill="#c9d6da"/>
    <path d="M0 430 H${WIDTH} V${HEIGHT} H0Z" fill="${EARTH[scene]}"/>
    ${tracks()}${SCENES[scene]}
    <g transform="translate(90 820)"><rect width="470" height="270" fill="#fff" stroke="#14212a" stroke-width="8"/>
      <text x="34" y="110" font-size="84" font-weight="700" fill="#14212a">${escapeXml(board[0])}</text>
      <text x="34" y="205" font-size="56" fill="#14212a">${escapeXml(board[1])}</text></g>
    <text x="${WIDTH - 40}" y="${HEIGHT - 40}" text-anchor="end" font-size="44" fill="#14212a">Demonstration sketch, not a photograph</text>
  </svg>`
  const time = takenAt.toISOString().slice(0, 19).replace(/-/g, ':').replace('T', ' ')
  return sharp(Buffer.from(svg)).withExif({ IFD2: { DateTimeOriginal: time, OffsetTimeOriginal: '+00:00' } }).jpeg({ quality: 90 }).toBuffer()
}

/** The prints of a padfoot drum, rows growing towards the viewer. */
function tracks(): string {
  const prints: string[] = []
  for (let row = 0; row < 7; row++) {
    const [size, y] = [14 + row * 9, 470 + row * (52 + row * 9)]
    for (let x = (row % 2) * size * 1.6; x < WIDTH; x += size * 3.2) prints.push(`<rect x="${x.toFixed(0)}" y="${y}" width="${size}" height="${(size * 0.6).toFixed(0)}" fill="#000" opacity="0.13"/>`)
  }
  return prints.join('')
}

const SCENES: Readonly<Record<Scene, string>> = {
  cone: '<ellipse cx="1050" cy="900" rx="250" ry="70" fill="#6d6f70"/><path d="M850 890 L1250 890 L1090 700 L1010 700Z" fill="#d8dcdc" stroke="#14212a" stroke-width="6"/><path d="M985 700 V470 Q1050 410 1115 470 V700Z" fill="#efe3c4" stroke="#14212a" stroke-width="6"/>',
  gauge: '<path d="M820 900 L1270 900 L1230 740 L860 740Z" fill="#e3c23a" stroke="#14212a" stroke-width="6"/><rect x="930" y="690" width="220" height="60" fill="#3f4f59"/><path d="M870 740 V420 H905 V740Z" fill="#8a9499" stroke="#14212a" stroke-width="6"/>',
  stake: '<path d="M1030 960 L1060 1010 L1090 960 V420 H1030Z" fill="#dcc9a0" stroke="#14212a" stroke-width="6"/><path d="M1090 430 L1330 480 L1090 560Z" fill="#d4127f" stroke="#14212a" stroke-width="6"/>',
  crumbs: Array.from({ length: 42 }, (_, index) => `<ellipse cx="${700 + ((index * 197) % 780)}" cy="${620 + ((index * 131) % 420)}" rx="${16 + ((index * 7) % 34)}" ry="${12 + ((index * 5) % 22)}" fill="#8b6f42" stroke="#5f4a2a" stroke-width="3"/>`).join(''),
}

const escapeXml = (text: string): string => text.replace(/[<>&"]/g, (mark) => `&#${mark.charCodeAt(0)};`)

/** A one-page PDF of plain lines of text (ISO 32000-1, 7.5 and 9.4). */
export function drawPdf(lines: readonly string[]): Buffer {
  const escaped = lines.map((line) => `(${line.replace(/[^\x20-\x7e]/g, '-').replace(/[\\()]/g, '\\$&')}) Tj T*`)
  const page = `BT /F1 12 Tf 18 TL 72 720 Td ${escaped.join(' ')} ET`
  const objects = [
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 612 792] /Contents 4 0 R /Resources << /Font << /F1 5 0 R >> >> >>',
    `<< /Length ${page.length} >>\nstream\n${page}\nendstream`,
    '<< /Type /Font /Subtype /Type1 /BaseFont /Helvetica >>',
  ]
  let body = '%PDF-1.4\n'
  const places = objects.map((object, index) => {
    const place = String(body.length).padStart(10, '0')
    body += `${index + 1} 0 obj\n${object}\nendobj\n`
    return `${place} 00000 n \n`
  })
  const table = `xref\n0 ${objects.length + 1}\n0000000000 65535 f \n${places.join('')}`
  return Buffer.from(`${body}${table}trailer\n<< /Size ${objects.length + 1} /Root 1 0 R >>\nstartxref\n${body.length}\n%%EOF\n`, 'latin1')
}
