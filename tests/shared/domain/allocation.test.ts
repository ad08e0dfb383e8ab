import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { allocateShares, isFar, type AllocationInput, type AllocationPoint, type AllocationSlice } from '#shared/domain/allocation.ts'
import { requiredTests, spokenVolume } from '#shared/domain/frequency.ts'

const SIDE = 1000
const COLUMNS = 8
const cellOf = (cell: number) => ({
  centroid: { u: (cell % COLUMNS) * SIDE + SIDE / 2, v: Math.floor(cell / COLUMNS) * SIDE + SIDE / 2 },
  thicknessUm: 200_000,
})
const slice = (cell: number, volumeCm3: number, placedAt = 0, id = 'p1'): AllocationSlice => ({ cell, slice: id, placedAt, volumeCm3 })
const point = (testId: string, cell: number, sampledAt = 10, outcome: AllocationPoint['outcome'] = 'pass'): AllocationPoint => ({
  testId,
  at: cellOf(cell).centroid,
  sampledAt,
  outcome,
})
const allocate = (input: Partial<AllocationInput>) => allocateShares({ slices: [], points: [], frozen: [], fCm3: 100, cellOf, ...input })
const given = (input: Partial<AllocationInput>) => allocate(input).shares.map(({ testId, cell, cm3 }) => `${testId} ${cell}:${cm3}`)

describe('speaking for', () => {
  it('gives the nearest fill first, and stops at f', () => {
    // a row of five cells of 40; the test in cell 2 has 100: all of 2, all of 1 (lower index of two equally near), 20 of 3
    const slices = [0, 1, 2, 3, 4].map((cell) => slice(cell, 40))
    expect(given({ slices, points: [point('t1', 2)] })).toEqual(['t1 2:40', 't1 1:40', 't1 3:20'])
  })

  it('lets two tests meet where their volumes meet', () => {
    const slices = [0, 1, 2, 3, 4].map((cell) => slice(cell, 40))
    const { held } = allocate({ slices, points: [point('t1', 0), point('t2', 4)] })
    expect([0, 1, 2, 3, 4].map((cell) => held.get(cell)?.pass)).toEqual([40, 40, 40, 40, 40])
  })

  it('gives fill placed before the sample its share before nearer fill placed after', () => {
    const slices = [slice(0, 100, 5), slice(1, 100, 20)]
    expect(given({ slices, points: [point('t1', 1, 10)] })).toEqual(['t1 0:100'])
    expect(given({ slices, points: [point('t1', 1, 10)], fCm3: 150 })).toEqual(['t1 0:100', 't1 1:50'])
  })

  it('gives later fill by its time of placing, not by distance', () => {
    const slices = [slice(1, 80, 30, 'p2'), slice(7, 80, 20, 'p1')]
    expect(given({ slices, points: [point('t1', 1, 10)] })).toEqual(['t1 7:80', 't1 1:20'])
  })

  it('holds fill for failures, suspicions and results still due, so that no pass speaks for it', () => {
    const slices = [slice(0, 100), slice(1, 100), slice(2, 100)]
    const points = [point('t1', 0, 10, 'fail'), point('t2', 1, 10, 'pending'), point('t3', 2)]
    const { held } = allocate({ slices, points })
    expect(held.get(0)).toEqual({ pass: 0, fail: 100, suspect: 0, pending: 0 })
    expect(held.get(1)).toEqual({ pass: 0, fail: 0, suspect: 0, pending: 100 })
    expect(held.get(2)).toEqual({ pass: 100, fail: 0, suspect: 0, pending: 0 })
  })

  it('takes released ground and what its test gave it out of the pool first', () => {
    const slices = [slice(0, 60), slice(1, 60), slice(2, 60)]
    const frozen = [{ cell: 2, volumeCm3: 60, pairs: [{ testId: 't1', cell: 2, cm3: 60 }] }]
    const { held, shares } = allocate({ slices, points: [point('t1', 0)], frozen })
    expect(shares.map(({ cell, cm3 }) => [cell, cm3])).toEqual([[0, 40]])
    expect(held.get(2)?.pass).toBe(60)
  })

  it('leaves only the top-up of a released cell to be spoken for', () => {
    const slices = [slice(0, 60, 0, 'p1'), slice(0, 15, 20, 'p2')]
    const frozen = [{ cell: 0, volumeCm3: 60, pairs: [{ testId: 't1', cell: 0, cm3: 60 }] }]
    const { shares } = allocate({ slices, points: [point('t1', 0), point('t2', 0, 30)], frozen })
    expect(shares.map(({ testId, slice: id, cm3 }) => [testId, id, cm3])).toEqual([['t2', 'p2', 15]])
  })

  it('lets a retest speak for the cells of its order before nearer fill', () => {
    const slices = [0, 1, 2].map((cell) => slice(cell, 60))
    const retest = { ...point('r1', 0), firstCells: [2] }
    expect(given({ slices, points: [retest] })).toEqual(['r1 2:60', 'r1 0:40'])
  })

  it('flags a share beyond twice the radius of the disc of f', () => {
    // f = 10 m³ in 0.2 m: a disc of 50 m², radius √(50/π) = 3.989 m, so twice is 7.979 m
    expect(isFar(7978 ** 2, 10_000_000, 200_000)).toBe(false)
    expect(isFar(7980 ** 2, 10_000_000, 200_000)).toBe(true)
    const slices = [slice(0, 5_000_000), slice(7, 5_000_000), slice(63, 10)]
    const { shares } = allocate({ slices, points: [point('t1', 0)], fCm3: 20_000_000 })
    expect(shares.map((share) => [share.cell, share.far])).toEqual([[0, false], [7, false], [63, false]])
    expect(allocate({ slices: [slice(63, 10)], points: [point('t1', 0)], fCm3: 10_000_000 }).shares[0].far).toBe(true)
  })
})

describe('properties of speaking for', () => {
  const slices = fc
    .uniqueArray(fc.record({ cell: fc.integer({ min: 0, max: 63 }), time: fc.integer({ min: 0, max: 9 }), volume: fc.integer({ min: 0, max: 90 }) }), {
      minLength: 1,
      maxLength: 25,
      selector: ({ cell, time }) => `${cell} ${time}`,
    })
    .map((items) => items.map(({ cell, time, volume }) => slice(cell, volume, time, `p${time}`)))
  const outcome = fc.constantFrom('pass', 'pass', 'fail', 'suspect', 'pending') as fc.Arbitrary<AllocationPoint['outcome']>
  const pointsOf = (outcomes: fc.Arbitrary<AllocationPoint['outcome']>) =>
    fc
      .array(fc.record({ u: fc.integer({ min: 0, max: 8000 }), v: fc.integer({ min: 0, max: 8000 }), sampledAt: fc.integer({ min: 0, max: 9 }), outcome: outcomes }), { maxLength: 8 })
      .map((items) => items.map(({ u, v, ...rest }, i): AllocationPoint => ({ testId: `t${(i * 7) % 11}`, at: { u, v }, ...rest })))
  const f = fc.integer({ min: 1, max: 300 })
  const settings = { seed: 20261201, numRuns: 300 }
  const total = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0)
  const byCell = (input: Partial<AllocationInput>) => {
    const cells = new Map<number, number>()
    for (const share of allocate(input).shares) cells.set(share.cell, (cells.get(share.cell) ?? 0) + share.cm3)
    return cells
  }
  const pairKey = ({ testId, cell, slice: id, cm3 }: { testId: string; cell: number; slice: string; cm3: number }) => `${testId} ${cell} ${id} ${cm3}`

  it('gives min(V, n·f) in all', () => {
    fc.assert(
      fc.property(slices, pointsOf(outcome), f, (fill, points, fCm3) => {
        const { shares } = allocate({ slices: fill, points, fCm3 })
        expect(total(shares.map((share) => share.cm3))).toBe(Math.min(total(fill.map((one) => one.volumeCm3)), points.length * fCm3))
      }),
      settings,
    )
  })

  it('never gives a slice or takes from a test more than it has', () => {
    fc.assert(
      fc.property(slices, pointsOf(outcome), f, (fill, points, fCm3) => {
        const { shares } = allocate({ slices: fill, points, fCm3 })
        for (const one of fill) {
          const got = total(shares.filter((share) => share.cell === one.cell && share.slice === one.slice).map((share) => share.cm3))
          expect(got).toBeLessThanOrEqual(one.volumeCm3)
        }
        for (const { testId } of points) expect(total(shares.filter((share) => share.testId === testId).map((share) => share.cm3))).toBeLessThanOrEqual(fCm3)
      }),
      settings,
    )
  })

  it('speaks for every cell exactly when the passes are as many as required', () => {
    fc.assert(
      fc.property(slices, pointsOf(fc.constant('pass')), f, fc.integer({ min: 1, max: 4 }), (fill, points, perCm3, atLeast) => {
        const volumeCm3 = total(fill.map((one) => one.volumeCm3))
        const rules = [{ kind: 'volume', scope: 'lot', perCm3 }, { kind: 'per-lot', atLeast }] as const
        const required = requiredTests(rules, { volumeCm3, areaMm2: 1 })
        fc.pre(volumeCm3 > required * required)
        const fCm3 = spokenVolume(rules, { volumeCm3, areaMm2: 1 })
        const spoken = byCell({ slices: fill, points, fCm3 })
        const volumes = new Map<number, number>()
        for (const one of fill) volumes.set(one.cell, (volumes.get(one.cell) ?? 0) + one.volumeCm3)
        const every = [...volumes].every(([cell, volume]) => (spoken.get(cell) ?? 0) === volume)
        expect(every).toBe(points.length >= required)
      }),
      settings,
    )
  })

  it('does not depend on the order in which the records arrived', () => {
    fc.assert(
      fc.property(slices, pointsOf(outcome), f, (fill, points, fCm3) => {
        const one = allocate({ slices: fill, points, fCm3 }).shares.map(pairKey)
        const other = allocate({ slices: [...fill].reverse(), points: [...points].reverse(), fCm3 }).shares.map(pairKey)
        expect(other).toEqual(one)
      }),
      settings,
    )
  })

  it('never leaves a slice with less when a test is added', () => {
    fc.assert(
      fc.property(slices, pointsOf(outcome), f, (fill, points, fCm3) => {
        fc.pre(points.length > 0)
        const before = byCell({ slices: fill, points: points.slice(1), fCm3 })
        const after = byCell({ slices: fill, points, fCm3 })
        for (const [cell, cm3] of before) expect(after.get(cell) ?? 0).toBeGreaterThanOrEqual(cm3)
      }),
      settings,
    )
  })

  it('never leaves a cell with less ground held by passes when a pass is added among passes', () => {
    fc.assert(
      fc.property(slices, pointsOf(fc.constant('pass')), f, (fill, points, fCm3) => {
        fc.pre(points.length > 0)
        const before = allocate({ slices: fill, points: points.slice(1), fCm3 }).held
        const after = allocate({ slices: fill, points, fCm3 }).held
        for (const [cell, { pass }] of before) expect(after.get(cell)?.pass ?? 0).toBeGreaterThanOrEqual(pass)
      }),
      settings,
    )
  })

  it('leaves every share of earlier fill as it is when fill is placed after all tests were sampled', () => {
    fc.assert(
      fc.property(slices, pointsOf(outcome), f, fc.integer({ min: 0, max: 63 }), fc.integer({ min: 1, max: 200 }), (fill, points, fCm3, cell, volume) => {
        const late = slice(cell, volume, 10, 'p10')
        const before = allocate({ slices: fill, points, fCm3 }).shares.map(pairKey)
        const after = allocate({ slices: [...fill, late], points, fCm3 }).shares.filter((share) => share.slice !== 'p10').map(pairKey)
        expect(after).toEqual(before)
      }),
      settings,
    )
  })

  it('never lowers what a test gives to the fill placed before it, whenever later fill is placed', () => {
    fc.assert(
      fc.property(slices, pointsOf(outcome), f, fc.integer({ min: 0, max: 63 }), fc.integer({ min: 0, max: 10 }), (fill, points, fCm3, cell, time) => {
        const toEarlier = (input: readonly AllocationSlice[], test: AllocationPoint) =>
          total(
            allocate({ slices: input, points, fCm3 })
              .shares.filter((share) => share.testId === test.testId && share.slice !== 'added' && Number(share.slice.slice(1)) <= test.sampledAt)
              .map((share) => share.cm3),
          )
        const added = slice(cell, 150, time, 'added')
        for (const test of points.filter((one) => one.sampledAt < time)) {
          expect(toEarlier([...fill, added], test)).toBeGreaterThanOrEqual(toEarlier(fill, test))
        }
      }),
      settings,
    )
  })
})
