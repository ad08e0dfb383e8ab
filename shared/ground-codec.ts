import { z } from 'zod'

/**
 * The one binary form of the Ground: a sheet (every cell at one cut) and a patch (the cells one change
 * touched, absolute, so that applying it twice does no harm). Little-endian. Elevations travel in tenths of
 * a millimetre so that they fit 32 bits on any mountain.
 */
const SHEET_MAGIC = 0x31475048 // "HPG1"
const PATCH_MAGIC = 0x31505048 // "HPP1"

export type GroundCut = { readonly kind: 'surface' } | { readonly kind: 'elevation'; readonly um: number }

/** Columns by cell index; all have the same length. */
export interface GroundSheet {
  readonly revision: number
  readonly cut: GroundCut
  /** state code (ground-state.ts) */
  readonly state: Uint8Array
  /** overlay bits (ground-state.ts) */
  readonly flags: Uint8Array
  /** lift shown in the cell; 0 is the foundation */
  readonly lift: Int16Array
  /** top of what is shown, tenths of a millimetre above datum */
  readonly top: Int32Array
  /** running number of the lot, 0 where there is none */
  readonly lot: Uint32Array
  /** running number of the test that names the state, 0 where there is none */
  readonly test: Uint32Array
}

/** What one (cell, lift) is, after a change. `top` as in GroundSheet. */
export interface CellStanding {
  readonly cell: number
  readonly lift: number
  readonly state: number
  readonly flags: number
  readonly top: number
  readonly lot: number
  readonly test: number
}

/** One touched (cell, lift) with the working surface its cell has after the change. */
export interface PatchEntry extends CellStanding {
  readonly surface: Omit<CellStanding, 'cell'>
}

/** Live totals of the title block; every figure is the server's. */
export const groundTotalsSchema = z.object({
  placedTodayCm3: z.number(),
  placedCm3: z.number(),
  spokenForCm3: z.number(),
  testsRequired: z.number(),
  testsTaken: z.number(),
  testsOwed: z.number(),
  cellsInRework: z.number(),
  openOrders: z.number(),
  readyCm3: z.number(),
  readyCells: z.number(),
})
export type GroundTotals = z.infer<typeof groundTotalsSchema>

const patchTailSchema = z.object({
  lots: z.array(z.string()),
  totals: groundTotalsSchema,
  from: z.object({ easting: z.number(), northing: z.number() }).nullable(),
})

export interface GroundPatch {
  readonly revision: number
  /** revision of the patch before this one, 0 for the first: revisions between changed nothing on the Ground */
  readonly base: number
  readonly entries: readonly PatchEntry[]
  /** ids of lots whose figures changed */
  readonly lots: readonly string[]
  readonly totals: GroundTotals
  /** where the change came from (the test), so that the ink-in can start there */
  readonly from: { readonly easting: number; readonly northing: number } | null
}

const CELL_BYTES = 1 + 1 + 2 + 4 + 4 + 4
const SHEET_HEADER = 4 + 8 + 8 + 4
const ENTRY_BYTES = 4 + 2 * (2 + 1 + 1 + 4 + 4 + 4)
const PATCH_HEADER = 4 + 8 + 8 + 4 + 4

/** Bytes of a sheet. The surface cut is carried as NaN in the place of the elevation. */
export function encodeSheet(sheet: GroundSheet): Uint8Array {
  const n = sheet.state.length
  const bytes = new Uint8Array(SHEET_HEADER + n * CELL_BYTES)
  const view = new DataView(bytes.buffer)
  view.setUint32(0, SHEET_MAGIC, true)
  view.setFloat64(4, sheet.revision, true)
  view.setFloat64(12, sheet.cut.kind === 'elevation' ? sheet.cut.um : NaN, true)
  view.setUint32(20, n, true)
  let at = SHEET_HEADER
  for (const column of [sheet.test, sheet.lot, sheet.top]) {
    for (let i = 0; i < n; i++, at += 4) view.setInt32(at, column[i]! | 0, true)
  }
  for (let i = 0; i < n; i++, at += 2) view.setInt16(at, sheet.lift[i]!, true)
  bytes.set(sheet.state, at)
  bytes.set(sheet.flags, at + n)
  return bytes
}

/**
 * Sheet of its bytes.
 * @throws Error when the bytes are not a sheet (cut short, or another version's).
 */
export function decodeSheet(bytes: Uint8Array): GroundSheet {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  if (bytes.byteLength < SHEET_HEADER || view.getUint32(0, true) !== SHEET_MAGIC) {
    throw new Error('These bytes are not a sheet of the Ground')
  }
  const um = view.getFloat64(12, true)
  const n = view.getUint32(20, true)
  if (bytes.byteLength !== SHEET_HEADER + n * CELL_BYTES) throw new Error('The sheet of the Ground is cut short')
  const test = new Uint32Array(n)
  const lot = new Uint32Array(n)
  const top = new Int32Array(n)
  const lift = new Int16Array(n)
  let at = SHEET_HEADER
  for (let i = 0; i < n; i++, at += 4) test[i] = view.getUint32(at, true)
  for (let i = 0; i < n; i++, at += 4) lot[i] = view.getUint32(at, true)
  for (let i = 0; i < n; i++, at += 4) top[i] = view.getInt32(at, true)
  for (let i = 0; i < n; i++, at += 2) lift[i] = view.getInt16(at, true)
  return {
    revision: view.getFloat64(4, true),
    cut: Number.isNaN(um) ? { kind: 'surface' } : { kind: 'elevation', um },
    state: bytes.slice(at, at + n),
    flags: bytes.slice(at + n, at + 2 * n),
    lift,
    top,
    lot,
    test,
  }
}

function writeStanding(view: DataView, at: number, s: Omit<CellStanding, 'cell'>): void {
  view.setInt16(at, s.lift, true)
  view.setUint8(at + 2, s.state)
  view.setUint8(at + 3, s.flags)
  view.setInt32(at + 4, s.top, true)
  view.setUint32(at + 8, s.lot, true)
  view.setUint32(at + 12, s.test, true)
}

function readStanding(view: DataView, at: number): Omit<CellStanding, 'cell'> {
  return {
    lift: view.getInt16(at, true),
    state: view.getUint8(at + 2),
    flags: view.getUint8(at + 3),
    top: view.getInt32(at + 4, true),
    lot: view.getUint32(at + 8, true),
    test: view.getUint32(at + 12, true),
  }
}

/** Bytes of a patch: header, entries, then lots, totals and origin as JSON. */
export function encodePatch(patch: GroundPatch): Uint8Array {
  const tail = new TextEncoder().encode(
    JSON.stringify({ lots: patch.lots, totals: patch.totals, from: patch.from }),
  )
  const bytes = new Uint8Array(PATCH_HEADER + patch.entries.length * ENTRY_BYTES + tail.length)
  const view = new DataView(bytes.buffer)
  view.setUint32(0, PATCH_MAGIC, true)
  view.setFloat64(4, patch.revision, true)
  view.setFloat64(12, patch.base, true)
  view.setUint32(20, patch.entries.length, true)
  view.setUint32(24, tail.length, true)
  let at = PATCH_HEADER
  for (const entry of patch.entries) {
    view.setUint32(at, entry.cell, true)
    writeStanding(view, at + 4, entry)
    writeStanding(view, at + 20, entry.surface)
    at += ENTRY_BYTES
  }
  bytes.set(tail, at)
  return bytes
}

/**
 * Patch of its bytes.
 * @throws Error when the bytes are not a patch.
 */
export function decodePatch(bytes: Uint8Array): GroundPatch {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  if (bytes.byteLength < PATCH_HEADER || view.getUint32(0, true) !== PATCH_MAGIC) {
    throw new Error('These bytes are not a patch of the Ground')
  }
  const count = view.getUint32(20, true)
  const tailLength = view.getUint32(24, true)
  if (bytes.byteLength !== PATCH_HEADER + count * ENTRY_BYTES + tailLength) {
    throw new Error('The patch of the Ground is cut short')
  }
  const entries: PatchEntry[] = []
  let at = PATCH_HEADER
  for (let i = 0; i < count; i++, at += ENTRY_BYTES) {
    entries.push({ cell: view.getUint32(at, true), ...readStanding(view, at + 4), surface: readStanding(view, at + 20) })
  }
  const tail = patchTailSchema.parse(JSON.parse(new TextDecoder().decode(bytes.subarray(at))))
  return { revision: view.getFloat64(4, true), base: view.getFloat64(12, true), entries, ...tail }
}

/**
 * The sheet after a patch. On the surface cut an entry's surface counts; on an elevation cut the entry counts
 * where its lift is the one shown there. Returns the touched cells; the sheet's arrays are changed in place.
 */
export function applyPatch(sheet: GroundSheet, patch: GroundPatch): { sheet: GroundSheet; cells: number[] } {
  const cells: number[] = []
  for (const entry of patch.entries) {
    const { cell } = entry
    if (cell >= sheet.state.length) continue
    const shown = sheet.cut.kind === 'surface' ? entry.surface : entry
    if (sheet.cut.kind === 'elevation' && sheet.lift[cell] !== entry.lift) continue
    sheet.state[cell] = shown.state
    sheet.flags[cell] = shown.flags
    sheet.lift[cell] = shown.lift
    sheet.top[cell] = shown.top
    sheet.lot[cell] = shown.lot
    sheet.test[cell] = shown.test
    cells.push(cell)
  }
  return { sheet: { ...sheet, revision: patch.revision }, cells }
}
