import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { distanceToEdge, lotEdge } from '#shared/domain/lot-edge.ts'
import { randomLocation, seededRandom } from '#shared/domain/seeded-random.ts'
import { drawStakes, serpentine, splitEqually, stakesRetiredBy, type StakeCell } from '#shared/domain/stakes.ts'

const SIDE = 7620
const COLUMNS = 10
const seed = '0123456789abcdef0123456789abcdef'
const cellAt = (column: number, row: number, unspokenCm3 = 100): StakeCell => ({
  cell: row * COLUMNS + column,
  column,
  row,
  outline: [
    { u: column * SIDE, v: row * SIDE },
    { u: (column + 1) * SIDE, v: row * SIDE },
    { u: (column + 1) * SIDE, v: (row + 1) * SIDE },
    { u: column * SIDE, v: (row + 1) * SIDE },
  ],
  unspokenCm3,
})
const block = (columns: number, rows: number) => Array.from({ length: columns * rows }, (_, i) => cellAt(i % columns, Math.floor(i / columns)))
const draw = (change: Partial<Parameters<typeof drawStakes>[0]> = {}) =>
  drawStakes({ owed: 3, standing: [], cells: block(6, 4), sideMm: SIDE, setbackMm: 1000, seed, ...change })

describe('random numbers', () => {
  it('place a sublot of 250 at random number .022 5.5 into it (random number tables S 605-99)', () => {
    expect(randomLocation(0, 250, 0.022)).toBeCloseTo(5.5, 12)
    expect(randomLocation(500, 250, 0.022)).toBeCloseTo(505.5, 12)
  })

  it('are the same for the same seed and uniform over 0 to 1', () => {
    const [one, other] = [seededRandom(seed), seededRandom(seed)]
    const numbers = Array.from({ length: 10_000 }, () => one())
    expect(numbers.slice(0, 50)).toEqual(Array.from({ length: 50 }, () => other()))
    const tenths = Array.from({ length: 10 }, (_, tenth) => numbers.filter((n) => Math.floor(n * 10) === tenth).length)
    // chi-square with 9 degrees of freedom: below 27.9 with probability 0.999
    expect(tenths.reduce((sum, n) => sum + (n - 1000) ** 2 / 1000, 0)).toBeLessThan(27.9)
    expect(numbers.every((n) => n >= 0 && n < 1)).toBe(true)
  })

  it('want a seed of 32 hexadecimal digits', () => {
    expect(() => seededRandom('abc')).toThrow(RangeError)
  })
})

describe('serpentine order and equal parts', () => {
  it('goes right in one row and left in the next', () => {
    expect(serpentine(block(3, 3)).map((cell) => cell.cell)).toEqual([0, 1, 2, 12, 11, 10, 20, 21, 22])
  })

  it('splits six equal cells into three pairs', () => {
    expect(splitEqually(serpentine(block(3, 2)), 3).map((group) => group.map((cell) => cell.cell))).toEqual([[0, 1], [2, 12], [11, 10]])
  })

  it('puts several groups in one cell that holds most of the volume', () => {
    const groups = splitEqually([cellAt(0, 0, 10), cellAt(1, 0, 1000), cellAt(2, 0, 10)], 3)
    expect(groups.map((group) => group.map((cell) => cell.cell))).toEqual([[0], [1], [2]])
    expect(splitEqually([cellAt(4, 0, 10)], 3).map((group) => group[0].cell)).toEqual([4, 4, 4])
  })

  it('makes groups equal to within one cell, and leaves no cell out', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 200 }), { minLength: 1, maxLength: 40 }), fc.integer({ min: 1, max: 8 }), (volumes, count) => {
        const cells = volumes.map((volume, i) => cellAt(i, 0, volume))
        const groups = splitEqually(cells, count)
        const total = volumes.reduce((sum, volume) => sum + volume, 0)
        expect(groups).toHaveLength(count)
        expect(new Set(groups.flat()).size).toBe(cells.length)
        for (const group of groups) {
          const volume = group.reduce((sum, cell) => sum + cell.unspokenCm3, 0)
          expect(Math.abs(volume - total / count)).toBeLessThanOrEqual(Math.max(...volumes))
        }
      }),
      { seed: 20261201, numRuns: 300 },
    )
  })
})

describe('the edge of a lot', () => {
  it('is its outline without the sides its cells share', () => {
    const edge = lotEdge(block(2, 1), SIDE)
    expect(edge).toHaveLength(6)
    expect(distanceToEdge({ u: SIDE, v: SIDE / 2 }, edge)).toBe(SIDE / 2)
    expect(distanceToEdge({ u: 100, v: SIDE / 2 }, edge)).toBe(100)
  })
})

describe('drawing stakes', () => {
  it('draws one point in each equal part for the tests owed and not yet staked (stratified, ASTM D3665)', () => {
    const stakes = draw()
    expect(stakes.map((stake) => stake.step.group)).toEqual([0, 1, 2])
    expect(stakes.map((stake) => stake.step.groupCells.length)).toEqual([8, 8, 8])
    for (const stake of stakes) expect(stake.step.groupCells).toContain(stake.cell)
    expect(draw({ standing: [{ cell: 0 }, { cell: 5 }] })).toHaveLength(1)
    expect(draw({ owed: 1, standing: [{ cell: 0 }, { cell: 5 }] })).toEqual([])
  })

  it('gives the same points for the same seed, others for another', () => {
    expect(draw()).toEqual(draw())
    expect(draw({ seed: 'f'.repeat(32) })).not.toEqual(draw())
  })

  it('leaves out ground that passes speak for and cells that are staked', () => {
    const cells = block(4, 1).map((cell) => ({ ...cell, unspokenCm3: cell.cell < 2 ? 0 : 100 }))
    expect(draw({ owed: 1, cells })[0].step.groupCells).toEqual([2, 3])
    expect(draw({ owed: 2, cells, standing: [{ cell: 2 }] })[0].step.groupCells).toEqual([3])
    expect(draw({ owed: 3, cells, standing: [{ cell: 2 }, { cell: 3 }] })[0].step.groupCells).toEqual([2, 3])
    const spoken = cells.map((cell) => ({ ...cell, unspokenCm3: 0 }))
    expect(draw({ owed: 1, cells: spoken })[0].step.groupCells).toEqual([0, 1, 2, 3])
  })

  it('lets the set-back fall where the lot is too small for it', () => {
    const [stake] = draw({ owed: 1, cells: [cellAt(0, 0)], setbackMm: 6000 })
    expect(stake.step.setbackMm).toBe(3000)
  })

  it('takes the middle of a sliver no whole millimetre lies in', () => {
    const sliver = { ...cellAt(0, 0), outline: [{ u: 0.2, v: 0 }, { u: 0.4, v: 0 }, { u: 0.4, v: 900 }, { u: 0.2, v: 900 }] }
    const [stake] = draw({ owed: 1, cells: [sliver] })
    expect(stake).toMatchObject({ cell: 0, u: 0, v: 450, step: { numbers: [], setbackMm: 0 } })
  })

  it('is uniform over the cut areas: a cell cut to half gets half the points', () => {
    const half = { ...cellAt(1, 0), outline: [{ u: SIDE, v: 0 }, { u: 2 * SIDE, v: 0 }, { u: SIDE, v: SIDE }] }
    const hits = Array.from({ length: 1500 }, (_, i) => draw({ owed: 1, cells: [cellAt(0, 0), half], setbackMm: 0, seed: (i * 2654435761).toString(16).padStart(32, '5') })[0].cell)
    // a third of 1,500 is 500, standard deviation 18.3: within four of them
    expect(Math.abs(hits.filter((cell) => cell === 1).length - 500)).toBeLessThan(73)
  })

  it('lies inside its cell and keeps the set-back that is possible', () => {
    const cells = fc.uniqueArray(fc.integer({ min: 0, max: 59 }), { minLength: 1, maxLength: 30 })
    const hex = fc.string({ unit: fc.constantFrom(...'0123456789abcdef'), minLength: 32, maxLength: 32 })
    fc.assert(
      fc.property(cells, fc.integer({ min: 1, max: 5 }), hex, (indices, owed, drawnSeed) => {
        const lot = indices.map((index) => cellAt(index % COLUMNS, Math.floor(index / COLUMNS)))
        const edge = lotEdge(lot, SIDE)
        const stakes = draw({ owed, cells: lot, setbackMm: 1500, seed: drawnSeed })
        expect(stakes).toHaveLength(owed)
        for (const { cell, u, v, step } of stakes) {
          expect([Math.floor(u / SIDE), Math.floor(v / SIDE)]).toEqual([cell % COLUMNS, Math.floor(cell / COLUMNS)])
          expect(step.setbackMm).toBe(1500)
          expect(distanceToEdge({ u, v }, edge)).toBeGreaterThanOrEqual(1500)
        }
      }),
      { seed: 20261201, numRuns: 150 },
    )
  })
})

describe('retiring stakes', () => {
  it('retires those within 3 m of a required test', () => {
    const stakes = [{ u: 3000, v: 0 }, { u: 3001, v: 0 }]
    expect(stakesRetiredBy(stakes, { u: 0, v: 0 })).toEqual([stakes[0]])
    expect(stakesRetiredBy(stakes, { u: 0, v: 0 }, 5000)).toEqual(stakes)
  })
})
