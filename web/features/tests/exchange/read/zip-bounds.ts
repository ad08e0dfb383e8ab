const END = 0x06054b50
const ENTRY = 0x02014b50
const LOCAL = 0x04034b50
const DEFLATED = 8
const MOST_ENTRIES = 500

interface Entry {
  readonly name: string
  readonly method: number
  readonly packed: number
  readonly offset: number
  readonly encrypted: boolean
}

/**
 * Holds a zip archive to a size before anything takes it apart: every part is unpacked once and thrown away, so that what the
 * directory claims does not matter.
 * @returns what is wrong with it, or undefined
 */
export async function zipProblem(bytes: Uint8Array, mostBytes: number): Promise<string | undefined> {
  const entries = readDirectory(bytes)
  if (entries === null || entries.length > MOST_ENTRIES) return 'This archive is damaged or no workbook. Save the workbook again as .xlsx.'
  if (entries.some((entry) => entry.encrypted)) return 'This workbook is locked with a password. Save it without one and choose it again.'
  if (!entries.some(({ name }) => name === 'xl/workbook.xml')) return 'This is an archive (zip), but no workbook. Choose a CSV file or an .xlsx workbook.'
  let left = mostBytes
  for (const entry of entries) {
    const size = await sizeOf(bytes, entry, left)
    if (size === null) return 'This workbook is damaged. Open it in a spreadsheet and save it again.'
    left -= size
    if (left < 0) return 'Unpacked, this workbook is far too large for a table of tests. Copy the tests into a workbook of their own.'
  }
  return undefined
}

function readDirectory(bytes: Uint8Array): Entry[] | null {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  let end = bytes.length - 22
  while (end >= 0 && view.getUint32(end, true) !== END) end--
  if (end < 0) return null
  const entries: Entry[] = []
  let at = view.getUint32(end + 16, true)
  for (let count = view.getUint16(end + 10, true); count > 0; count--) {
    if (at + 46 > bytes.length || view.getUint32(at, true) !== ENTRY) return null
    const [name, extra, comment] = [view.getUint16(at + 28, true), view.getUint16(at + 30, true), view.getUint16(at + 32, true)]
    entries.push({
      name: new TextDecoder().decode(bytes.subarray(at + 46, at + 46 + name)),
      method: view.getUint16(at + 10, true),
      packed: view.getUint32(at + 20, true),
      offset: view.getUint32(at + 42, true),
      encrypted: (view.getUint16(at + 8, true) & 1) === 1,
    })
    at += 46 + name + extra + comment
  }
  return entries
}

/** Bytes of a part once unpacked, counted no further than `most`; null where it cannot be unpacked. */
async function sizeOf(bytes: Uint8Array, { method, packed, offset }: Entry, most: number): Promise<number | null> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  if (offset + 30 > bytes.length || view.getUint32(offset, true) !== LOCAL) return null
  const start = offset + 30 + view.getUint16(offset + 26, true) + view.getUint16(offset + 28, true)
  if (start + packed > bytes.length) return null
  if (method === 0) return packed
  return method === DEFLATED ? inflatedSize(bytes.subarray(start, start + packed), most) : null
}

async function inflatedSize(packed: Uint8Array, most: number): Promise<number | null> {
  const inflate = new DecompressionStream('deflate-raw')
  const writer = inflate.writable.getWriter()
  // whatever goes wrong is told by the reading side
  void writer.write(new Uint8Array(packed)).then(() => writer.close()).catch(() => undefined)
  const reader = inflate.readable.getReader()
  let size = 0
  try {
    for (;;) {
      const { done, value } = await reader.read()
      if (done) return size
      size += value.length
      if (size > most) {
        void reader.cancel().catch(() => undefined)
        return size
      }
    }
  } catch {
    return null
  }
}
