import { describe, expect, test } from 'vitest'
import { GROUND_FLAGS, groundStateCode, type GroundState } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { EDGE_SIDES, HIGHLIGHT_BIT, SELECTED_BIT, createBoardTexture, type BoardTexture } from '#web/features/ground/board/board-texture.ts'
import { BOARD_GRID, BOARD_SITE, boardCellAt, buildBoardSheet } from '#tests/fixtures/board-site.ts'

/** Three by two places with a hole at the upper right: the dense index and the place in the grid differ. */
const CELLS = { column: [0, 1, 0, 1, 2], row: [0, 0, 1, 1, 1], zone: [0, 0, 0, 0, 0], baseUm: [0, 0, 0, 0, 0] }
const SIZE = { columns: 3, rows: 2 }

interface Ground {
  state?: GroundState
  flags?: number
  lift?: number
  top?: number
}

function sheetOf(ground: readonly Ground[]): GroundSheet {
  return {
    revision: 1,
    cut: { kind: 'surface' },
    state: Uint8Array.from(ground, ({ state }) => groundStateCode(state ?? 'meets-spec')),
    flags: Uint8Array.from(ground, ({ flags }) => flags ?? 0),
    lift: Int16Array.from(ground, ({ lift }) => lift ?? 1),
    top: Int32Array.from(ground, ({ top }) => top ?? 50_000),
    lot: new Uint32Array(ground.length),
    test: new Uint32Array(ground.length),
  }
}

const texel = (texture: BoardTexture, column: number, row: number): number[] => {
  const at = (row * texture.columns + column) * 4
  return [...texture.bytes.subarray(at, at + 4)]
}

function edgesAt(texture: BoardTexture, column: number, row: number): Record<string, number> {
  const byte = texel(texture, column, row)[2]!
  return Object.fromEntries(EDGE_SIDES.map(({ side, shift }) => [side, (byte >> shift) & 3]))
}

describe('texels', () => {
  test('stand at the place in the grid, not at the dense index, and a place without a cell stays empty', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    texture.write(sheetOf([{}, {}, { state: 'rework' }, {}, { state: 'suspect', flags: GROUND_FLAGS.hold }]), 0)
    expect(texel(texture, 0, 1)[0]! & 15).toBe(groundStateCode('rework'))
    expect(texel(texture, 2, 1)[0]! & 15).toBe(groundStateCode('suspect'))
    expect(texel(texture, 2, 1)[1]).toBe(GROUND_FLAGS.hold)
    expect(texel(texture, 2, 0)).toEqual([0, 0, 0, 0])
  })

  test('keep the look before a running change and forget it when that has settled', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    texture.write(sheetOf([{ flags: GROUND_FLAGS.near }, {}, {}, {}, {}]), 0)
    texture.write(sheetOf([{ state: 'rework' }, {}, {}, {}, {}]), 2)
    const [red, , , alpha] = texel(texture, 0, 0)
    expect([red! & 15, red! >> 4]).toEqual([groundStateCode('rework'), groundStateCode('meets-spec')])
    expect([alpha! & 3, alpha! >> 2]).toEqual([2, GROUND_FLAGS.near])
    texture.settle(2)
    expect(texel(texture, 0, 0)[3]).toBe(0)
  })

  test('that a later change has taken over are left alone when the earlier one settles', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    texture.write(sheetOf([{}, {}, {}, {}, {}]), 0)
    texture.write(sheetOf([{ state: 'rework' }, {}, {}, {}, {}]), 1)
    texture.write(sheetOf([{ state: 'released' }, {}, {}, {}, {}]), 2)
    texture.settle(1)
    expect(texel(texture, 0, 0)[3]! & 3).toBe(2)
  })

  test('are reported and marked dirty only where a cell looks different', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    const sheet = sheetOf([{}, {}, {}, {}, {}])
    expect(texture.write(sheet, 0)).toHaveLength(5)
    texture.takeDirty()
    expect(texture.write(sheet, 1)).toEqual([])
    expect(texture.takeDirty()).toBeUndefined()
    sheet.state[4] = groundStateCode('rework')
    expect(texture.write(sheet, 1, [3, 4, 400])).toEqual([4])
    expect(texture.takeDirty()).toEqual({ column: 2, row: 1, columns: 1, rows: 1 })
    expect(texture.takeDirty()).toBeUndefined()
  })

  test('carry selection and preview through changes of the sheet, and give them up exactly', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    texture.mark(SELECTED_BIT, [0, 1, -1, 77])
    texture.mark(HIGHLIGHT_BIT, [1])
    texture.write(sheetOf([{ flags: GROUND_FLAGS.near }, { flags: GROUND_FLAGS.covered }, {}, {}, {}]), 0)
    expect(texel(texture, 0, 0)[1]).toBe(GROUND_FLAGS.near | SELECTED_BIT)
    expect(texel(texture, 1, 0)[1]).toBe(GROUND_FLAGS.covered | SELECTED_BIT | HIGHLIGHT_BIT)
    texture.mark(SELECTED_BIT, [3])
    expect(texel(texture, 0, 0)[1]).toBe(GROUND_FLAGS.near)
    expect(texel(texture, 1, 0)[1]).toBe(GROUND_FLAGS.covered | HIGHLIGHT_BIT)
    expect(texel(texture, 1, 1)[1]).toBe(SELECTED_BIT)
  })
})

describe('step edges', () => {
  test('compare tops, so that two lift numbers at one height are level', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    texture.write(sheetOf([{ lift: 3 }, { lift: 8 }, {}, {}, {}]), 0)
    expect(edgesAt(texture, 0, 0)).toEqual({ top: 0, right: 0, bottom: 0, left: 0 })
  })

  test('say on both sides who stands higher', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    texture.write(sheetOf([{ top: 52_000 }, {}, {}, {}, {}]), 0)
    expect(edgesAt(texture, 0, 0)).toEqual({ top: 0, right: 1, bottom: 1, left: 0 })
    expect(edgesAt(texture, 1, 0)).toEqual({ top: 0, right: 0, bottom: 0, left: 2 })
    expect(edgesAt(texture, 0, 1)).toEqual({ top: 2, right: 0, bottom: 0, left: 0 })
  })

  test('need a difference that shows: 30 mm is a step, 29.9 mm is level', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    texture.write(sheetOf([{ top: 50_299 }, {}, {}, {}, {}]), 0)
    expect(edgesAt(texture, 0, 0).right).toBe(0)
    texture.write(sheetOf([{ top: 50_300 }, {}, {}, {}, {}]), 0)
    expect(edgesAt(texture, 0, 0).right).toBe(1)
  })

  test('are not drawn across bare ground however it slopes', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    const bare = { lift: 0, state: 'not-placed' } as const
    texture.write(sheetOf([{ ...bare, top: 1 }, { ...bare, top: 9_000 }, { lift: 0, state: 'released', top: 30_000 }, { ...bare }, { ...bare }]), 0)
    expect(edgesAt(texture, 0, 0)).toEqual({ top: 0, right: 0, bottom: 0, left: 0 })
  })

  test('hold a placed cell above one that is not placed even where the planned top is the same', () => {
    const texture = createBoardTexture(SIZE, CELLS)
    texture.write(sheetOf([{}, { state: 'not-placed', lift: 1 }, {}, {}, {}]), 0)
    expect(edgesAt(texture, 0, 0).right).toBe(1)
    expect(edgesAt(texture, 1, 0).left).toBe(2)
  })

  test('of the neighbours follow when one cell is patched, as if the whole sheet had been written', () => {
    const sheet = buildBoardSheet()
    const patched = createBoardTexture(BOARD_GRID, BOARD_SITE.cells)
    patched.write(sheet, 0)
    const cell = boardCellAt(11, 6)
    sheet.lift[cell] = 11
    sheet.top[cell]! += 2032
    patched.write(sheet, 0, [cell])
    const whole = createBoardTexture(BOARD_GRID, BOARD_SITE.cells)
    whole.write(sheet, 0)
    const edges = (texture: BoardTexture): number[] => [...texture.bytes].filter((_, index) => index % 4 === 2)
    expect(edges(patched)).toEqual(edges(whole))
    expect(edgesAt(patched, 11, 6)).toEqual({ top: 1, right: 1, bottom: 1, left: 1 })
  })
})
