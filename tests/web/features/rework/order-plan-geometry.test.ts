import { describe, expect, it } from 'vitest'
import { makeCellLookup } from '#shared/domain/cells.ts'
import { groundStateCode } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { distanceToCells, layOutOrder } from '#web/features/rework/order/order-plan-geometry.ts'
import { buildCellColumns, buildSiteView } from '#tests/factories/site-view.ts'

const { grid } = buildSiteView()
const columns = buildCellColumns()
const cells = columns.column.map((column, cell) => ({ cell, column, row: columns.row[cell] ?? 0, zone: 0, areaMm2: 1, centroid: { u: 0, v: 0 }, baseUm: 0, designUm: 0 }))
const lookup = makeCellLookup(cells, grid.columns)
const SIDE_MM = (50 * 1_200_000) / 3937

/** Tops in tenths of a millimetre; lift 3 everywhere. */
function sheetOf(tops: Readonly<Record<number, number>>): GroundSheet {
  return {
    revision: 1,
    cut: { kind: 'surface' },
    state: Uint8Array.from(cells, () => groundStateCode('released')),
    flags: new Uint8Array(12),
    lift: Int16Array.from(cells, () => 3),
    top: Int32Array.from(cells, ({ cell }) => tops[cell] ?? 6_096),
    lot: new Uint32Array(12),
    test: new Uint32Array(12),
  }
}

const layOut = (sheet: GroundSheet | undefined) => layOutOrder({ cells: [0, 1, 4, 5], lift: 3, state: 'rework', lookup, grid, sheet, width: 400, height: 260 })

describe('the plan of an order', () => {
  it('puts the cells in its middle, one square each, with the ground around them', () => {
    const { squares, side, centre } = layOut(sheetOf({}))
    expect(side).toBe(52)
    expect(centre).toEqual({ x: 200, y: 130 })
    expect(squares).toHaveLength(12)
    const own = squares.filter((square) => square.own)
    expect(own.map(({ cell, x, y }) => [cell, x, y])).toEqual([[0, 148, 78], [1, 200, 78], [4, 148, 130], [5, 200, 130]])
  })

  it('shows the order’s own state where the sheet shows a higher lift, or none was read yet', () => {
    const covered = sheetOf({})
    covered.lift[0] = 4
    expect(layOut(covered).squares.find((square) => square.cell === 0)?.state).toBe('rework')
    expect(layOut(undefined).squares.filter((square) => square.own).map((square) => square.state)).toEqual(['rework', 'rework', 'rework', 'rework'])
  })

  it('draws a step towards the low side, open from a fall of 300 mm', () => {
    const { edges } = layOut(sheetOf({ 2: 4_064, 6: 2_032 }))
    const beside = edges.filter((edge) => edge.upright && edge.x === 252)
    expect(beside.map(({ low, open }) => [low, open])).toEqual([[1, false], [1, true]])
  })

  it('draws no step where tops differ by less than 100 mm', () => {
    expect(layOut(sheetOf({ 2: 5_200 })).edges).toEqual([])
  })
})

describe('the distance of a person to the work', () => {
  it('is nought inside and else that to the nearest cell', () => {
    expect(distanceToCells({ u: SIDE_MM / 2, v: SIDE_MM / 2 }, [0], lookup, grid)).toBe(0)
    expect(distanceToCells({ u: SIDE_MM + 3_000, v: SIDE_MM + 4_000 }, [0], lookup, grid)).toBeCloseTo(5_000, 1)
    expect(distanceToCells({ u: 0, v: 0 }, [], lookup, grid)).toBeNull()
  })
})
