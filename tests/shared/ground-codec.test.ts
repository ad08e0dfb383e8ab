import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import {
  applyPatch,
  decodePatch,
  decodeSheet,
  encodePatch,
  encodeSheet,
  type CellStanding,
  type GroundPatch,
  type GroundSheet,
  type GroundTotals,
} from '#shared/ground-codec.ts'

const uint = (max: number) => fc.integer({ min: 0, max })
const int32 = fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 })
const int16 = fc.integer({ min: -(2 ** 15), max: 2 ** 15 - 1 })
const uint32 = uint(2 ** 32 - 1)

const sheetWith = (length: number, cut: GroundSheet['cut'] = { kind: 'surface' }): GroundSheet => ({
  revision: 7,
  cut,
  state: new Uint8Array(length),
  flags: new Uint8Array(length),
  lift: new Int16Array(length),
  top: new Int32Array(length),
  lot: new Uint32Array(length),
  test: new Uint32Array(length),
})

const anySheet: fc.Arbitrary<GroundSheet> = uint(40).chain((length) => {
  const column = (value: fc.Arbitrary<number>) => fc.array(value, { minLength: length, maxLength: length })
  return fc.record({
    revision: uint(Number.MAX_SAFE_INTEGER),
    cut: fc.oneof(fc.constant({ kind: 'surface' } as const), fc.record({ kind: fc.constant('elevation' as const), um: fc.integer({ min: -1e9, max: 9e9 }) })),
    state: column(uint(255)).map((values) => Uint8Array.from(values)),
    flags: column(uint(255)).map((values) => Uint8Array.from(values)),
    lift: column(int16).map((values) => Int16Array.from(values)),
    top: column(int32).map((values) => Int32Array.from(values)),
    lot: column(uint32).map((values) => Uint32Array.from(values)),
    test: column(uint32).map((values) => Uint32Array.from(values)),
  })
})

const TOTALS: GroundTotals = {
  placedTodayCm3: 1,
  placedCm3: 2,
  spokenForCm3: 3,
  testsRequired: 4,
  testsTaken: 5,
  testsOwed: 6,
  cellsInRework: 7,
  openOrders: 8,
  readyCm3: 9,
  readyCells: 10,
}

const anyStanding = fc.record({ lift: int16, state: uint(9), flags: uint(63), top: int32, lot: uint32, test: uint32 })
const anyPatch: fc.Arbitrary<GroundPatch> = fc.record({
  revision: uint(Number.MAX_SAFE_INTEGER),
  base: uint(Number.MAX_SAFE_INTEGER),
  entries: fc.array(
    fc.tuple(uint(60), anyStanding, anyStanding).map(([cell, standing, surface]) => ({ cell, ...standing, surface })),
    { maxLength: 12 },
  ),
  lots: fc.array(fc.uuid(), { maxLength: 3 }),
  totals: fc.constant(TOTALS),
  from: fc.option(fc.record({ easting: fc.integer(), northing: fc.integer() })),
})

const standing = (cell: number, lift: number, state: number): CellStanding => ({ cell, lift, state, flags: 0, top: lift * 100, lot: 1, test: 2 })

describe('sheets', () => {
  test('come back from their bytes exactly as they were', () => {
    fc.assert(
      fc.property(anySheet, (sheet) => {
        expect(decodeSheet(encodeSheet(sheet))).toEqual(sheet)
      }),
      { seed: 20261201, numRuns: 200 },
    )
  })

  test('come back from a view that does not start at the beginning of its buffer', () => {
    const bytes = encodeSheet(sheetWith(5))
    const larger = new Uint8Array(bytes.length + 3)
    larger.set(bytes, 3)
    expect(decodeSheet(larger.subarray(3))).toEqual(sheetWith(5))
  })

  test('are refused when cut short, too long, of another kind or empty', () => {
    const bytes = encodeSheet(sheetWith(5))
    for (let length = 0; length < bytes.length; length++) expect(() => decodeSheet(bytes.slice(0, length))).toThrow(Error)
    expect(() => decodeSheet(Uint8Array.of(...bytes, 0))).toThrow('cut short')
    expect(() => decodeSheet(encodePatch({ revision: 1, base: 0, entries: [], lots: [], totals: TOTALS, from: null }))).toThrow('not a sheet')
  })

  test('take 16 bytes a cell, so that 35,000 cells are below 600 kB before compression', () => {
    expect(encodeSheet(sheetWith(35_000)).length).toBe(24 + 35_000 * 16)
  })
})

describe('patches', () => {
  test('come back from their bytes exactly as they were', () => {
    fc.assert(
      fc.property(anyPatch, (patch) => {
        expect(decodePatch(encodePatch(patch))).toEqual(patch)
      }),
      { seed: 20261201, numRuns: 200 },
    )
  })

  test('are refused when cut short or of another kind', () => {
    const bytes = encodePatch({ revision: 1, base: 0, entries: [{ ...standing(0, 1, 2), surface: standing(0, 1, 2) }], lots: [], totals: TOTALS, from: null })
    for (let length = 0; length < bytes.length; length++) expect(() => decodePatch(bytes.slice(0, length))).toThrow(Error)
    expect(() => decodePatch(encodeSheet(sheetWith(9)))).toThrow('not a patch')
  })
})

describe('applying a patch', () => {
  const patch: GroundPatch = {
    revision: 8,
    base: 7,
    entries: [
      { ...standing(1, 4, 5), surface: standing(1, 6, 2) },
      { ...standing(2, 3, 8), surface: standing(2, 3, 8) },
      { ...standing(99, 3, 8), surface: standing(99, 3, 8) },
    ],
    lots: [],
    totals: TOTALS,
    from: null,
  }

  test('shows the surface of the touched cells on the surface cut, and leaves out cells the sheet does not have', () => {
    const { sheet, cells } = applyPatch(sheetWith(4), patch)
    expect(cells).toEqual([1, 2])
    expect(sheet.revision).toBe(8)
    expect([...sheet.state]).toEqual([0, 2, 8, 0])
    expect([...sheet.lift]).toEqual([0, 6, 3, 0])
  })

  test('changes an elevation cut only where the entry is the lift shown there', () => {
    const cut = sheetWith(4, { kind: 'elevation', um: 1_000_000 })
    cut.lift.fill(4)
    const { sheet, cells } = applyPatch(cut, patch)
    expect(cells).toEqual([1])
    expect([...sheet.state]).toEqual([0, 5, 0, 0])
    expect([...sheet.lift]).toEqual([4, 4, 4, 4])
  })

  test('twice is the same as once, on both cuts', () => {
    fc.assert(
      fc.property(anySheet, anyPatch, (sheet, any) => {
        const once = structuredClone(applyPatch(sheet, any).sheet)
        expect(applyPatch(sheet, any).sheet).toEqual(once)
      }),
      { seed: 20261201, numRuns: 200 },
    )
  })
})
