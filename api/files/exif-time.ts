const BIG_ENDIAN = 0x4d4d
const LITTLE_ENDIAN = 0x4949
/** tags of Exif 2.32 (CIPA DC-008), sections 4.6.3 and 4.6.6 */
const EXIF_FOLDER = 0x8769
const DATE_TIME_ORIGINAL = 0x9003
const OFFSET_TIME_ORIGINAL = 0x9011
const ENTRY_BYTES = 12
/** more than any camera writes; bounds what a made-up file can ask for */
const MOST_ENTRIES = 500

/** When a picture was taken, as its camera wrote it: local time, and its offset from UTC where the camera knew it. */
export interface ExifTime {
  /** '2026-12-01T14:32:07' */
  readonly local: string
  /** '-08:00' */
  readonly offset: string | null
}

type Entry = { readonly at: number; readonly count: number }

/**
 * DateTimeOriginal of a block of Exif data, with or without its "Exif" mark in front. Null when it has none, or is damaged: no
 * offset is followed out of the block.
 */
export function readExifTime(block: Uint8Array): ExifTime | null {
  const start = block[0] === 0x45 && block[1] === 0x78 ? 6 : 0
  const view = new DataView(block.buffer, block.byteOffset + Math.min(start, block.byteLength), Math.max(0, block.byteLength - start))
  if (view.byteLength < 8) return null
  const order = view.getUint16(0)
  if (order !== BIG_ENDIAN && order !== LITTLE_ENDIAN) return null
  const little = order === LITTLE_ENDIAN
  const folder = readFolder(view, view.getUint32(4, little), little).get(EXIF_FOLDER)
  if (!folder) return null
  const entries = readFolder(view, view.getUint32(folder.at, little), little)
  const time = /^(\d{4}):(\d\d):(\d\d) (\d\d:\d\d:\d\d)/.exec(textOf(view, entries.get(DATE_TIME_ORIGINAL), little))
  if (!time) return null
  const offset = /^[+-]\d\d:\d\d/.exec(textOf(view, entries.get(OFFSET_TIME_ORIGINAL), little))
  return { local: `${time[1]}-${time[2]}-${time[3]}T${time[4]}`, offset: offset?.[0] ?? null }
}

/** The entries of a folder (IFD) by tag: where each one's four bytes of value stand, and how many values it counts. */
function readFolder(view: DataView, at: number, little: boolean): Map<number, Entry> {
  const entries = new Map<number, Entry>()
  if (at + 2 > view.byteLength) return entries
  const count = Math.min(view.getUint16(at, little), MOST_ENTRIES, Math.floor((view.byteLength - at - 2) / ENTRY_BYTES))
  for (let index = 0; index < count; index++) {
    const entry = at + 2 + index * ENTRY_BYTES
    entries.set(view.getUint16(entry, little), { at: entry + 8, count: view.getUint32(entry + 4, little) })
  }
  return entries
}

/** An entry of ASCII text: in its own four bytes, or where they point. */
function textOf(view: DataView, entry: Entry | undefined, little: boolean): string {
  if (!entry) return ''
  const at = entry.count <= 4 ? entry.at : view.getUint32(entry.at, little)
  const length = Math.min(entry.count, 32, Math.max(0, view.byteLength - at))
  return Array.from({ length }, (_, index) => String.fromCharCode(view.getUint8(at + index))).join('')
}
