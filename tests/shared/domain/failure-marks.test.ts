import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { markFailure, type MarkableCell } from '#shared/domain/failure-marks.ts'

const SIDE = 1000
const cellAt = (column: number, row: number, volumeCm3 = 10): MarkableCell => ({
  cell: row * 10 + column,
  column,
  row,
  centroid: { u: column * SIDE + 500, v: row * SIDE + 500 },
  volumeCm3,
})
const row = (columns: readonly number[]) => columns.map((column) => cellAt(column, 0))

describe('the ground a failure marks', () => {
  it('is its own cell and the nearest of its lot, up to f', () => {
    const marked = markFailure({ failAt: { u: 2500, v: 500 }, failCell: 2, passes: [], lotCells: row([0, 1, 2, 3, 4]), fCm3: 40 })
    expect(marked).toEqual([2, 1, 3, 0])
  })

  it('stops where a pass is as near', () => {
    // fail in 1, pass in 5: cell 3 lies 2 m from both and is not marked
    const marked = markFailure({ failAt: { u: 1500, v: 500 }, failCell: 1, passes: [{ u: 5500, v: 500 }], lotCells: row([0, 1, 2, 3, 4, 5]), fCm3: 1000 })
    expect(marked).toEqual([1, 0, 2])
  })

  it('does not cross a gap in the lot', () => {
    expect(markFailure({ failAt: { u: 500, v: 500 }, failCell: 0, passes: [], lotCells: row([0, 1, 3, 4]), fCm3: 1000 })).toEqual([0, 1])
  })

  it('reaches over a corner, as a lot does', () => {
    const lotCells = [cellAt(0, 0), cellAt(1, 1)]
    expect(markFailure({ failAt: { u: 500, v: 500 }, failCell: 0, passes: [], lotCells, fCm3: 1000 })).toEqual([0, 11])
  })

  it('always holds its own cell, even beyond f, without volume, or beside a pass', () => {
    const failing = { failAt: { u: 500, v: 500 }, failCell: 0, passes: [] }
    expect(markFailure({ ...failing, lotCells: [cellAt(0, 0, 500), cellAt(1, 0)], fCm3: 100 })).toEqual([0])
    expect(markFailure({ ...failing, lotCells: [cellAt(0, 0, 0)], fCm3: 0 })).toEqual([0])
    expect(markFailure({ ...failing, passes: [{ u: 500, v: 500 }], lotCells: row([0, 1]), fCm3: 100 })).toEqual([0])
  })

  it('never marks more than f beyond its own cell, and nothing nearer to a pass', () => {
    const cells = fc.uniqueArray(fc.integer({ min: 0, max: 99 }), { minLength: 1, maxLength: 40 })
    const place = fc.record({ u: fc.integer({ min: 0, max: 9999 }), v: fc.integer({ min: 0, max: 9999 }) })
    fc.assert(
      fc.property(cells, place, fc.array(place, { maxLength: 4 }), fc.integer({ min: 0, max: 300 }), (indices, failAt, passes, fCm3) => {
        const failCell = Math.floor(failAt.v / SIDE) * 10 + Math.floor(failAt.u / SIDE)
        const lotCells = [...new Set([failCell, ...indices])].map((index) => cellAt(index % 10, Math.floor(index / 10)))
        const marked = markFailure({ failAt, failCell, passes, lotCells, fCm3 })
        expect(marked[0]).toBe(failCell)
        expect(new Set(marked).size).toBe(marked.length)
        expect(marked.length * 10).toBeLessThanOrEqual(Math.max(10, fCm3))
        const distance = (index: number, to: { u: number; v: number }) => Math.hypot((index % 10) * SIDE + 500 - to.u, Math.floor(index / 10) * SIDE + 500 - to.v)
        for (const index of marked.slice(1)) for (const pass of passes) expect(distance(index, failAt)).toBeLessThan(distance(index, pass))
      }),
      { seed: 20261201, numRuns: 300 },
    )
  })
})
