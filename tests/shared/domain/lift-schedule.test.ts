import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cellLayers, checkLiftPlan, layerAt, liftAtElevation, railBands, testLayer } from '#shared/domain/lift-schedule.ts'
import type { LiftPlan } from '#shared/domain/site-geometry.ts'
import { SEEDED } from './plan-arbitraries.ts'

// no publication works these by example: hand-counted from the rules of domain section 4
const MM = 1000
const level: LiftPlan = { kind: 'level', datumUm: 0, thicknessUm: 200 * MM }
const short = (plan: LiftPlan, baseMm: number, designMm: number, maxMm?: number) =>
  cellLayers(plan, baseMm * MM, designMm * MM, maxMm === undefined ? {} : { maxThicknessUm: maxMm * MM }).map(
    ({ lift, bottomUm, topUm }) => `${lift}: ${bottomUm / MM}-${topUm / MM}`,
  )

describe('the lift schedule', () => {
  it('numbers level lifts from the datum, so that a cell on higher ground starts at a higher lift', () => {
    expect(short(level, 0, 600)).toEqual(['1: 0-200', '2: 200-400', '3: 400-600'])
    expect(short(level, 400, 800)).toEqual(['3: 400-600', '4: 600-800'])
  })

  it('joins a partial lift under half a thickness to its neighbour and keeps one of half or more', () => {
    expect(short(level, 110, 600)).toEqual(['2: 110-400', '3: 400-600'])
    expect(short(level, 100, 600)).toEqual(['1: 100-200', '2: 200-400', '3: 400-600'])
    expect(short(level, 0, 499)).toEqual(['1: 0-200', '2: 200-499'])
    expect(short(level, 0, 500)).toEqual(['1: 0-200', '2: 200-400', '3: 400-500'])
  })

  it('leaves a partial lift alone when the joined layer would exceed the limit', () => {
    expect(short(level, 150, 400, 240)).toEqual(['1: 150-200', '2: 200-400'])
    expect(short(level, 170, 400, 240)).toEqual(['2: 170-400'])
    // thin at both ends of one whole lift: the lower joins first, the upper no longer fits
    expect(short(level, 120, 480)).toEqual(['2: 120-400', '3: 400-480'])
  })

  it('gives fill thinner than a lift one layer, numbered by the band that holds most of it', () => {
    expect(short(level, 230, 290)).toEqual(['2: 230-290'])
    expect(short(level, 150, 220)).toEqual(['1: 150-220'])
    expect(short(level, 180, 250)).toEqual(['2: 180-250'])
  })

  it('counts up from the base, or down from the design grade', () => {
    expect(short({ kind: 'parallel-to-base', thicknessUm: 200 * MM }, 70, 560)).toEqual(['1: 70-270', '2: 270-560'])
    expect(short({ kind: 'parallel-to-base', thicknessUm: 200 * MM }, 70, 620)).toEqual(['1: 70-270', '2: 270-470', '3: 470-620'])
    expect(short({ kind: 'down-from-design', thicknessUm: 200 * MM }, 70, 560)).toEqual(['2: 70-360', '3: 360-560'])
    expect(short({ kind: 'down-from-design', thicknessUm: 200 * MM }, 50, 600)).toEqual(['1: 50-200', '2: 200-400', '3: 400-600'])
  })

  it('has no layers in cut or at grade', () => {
    expect(short(level, 300, 300)).toEqual([])
    expect(short(level, 300, 100)).toEqual([])
  })

  it('refuses a plan that can not cut the fill, with the reason', () => {
    expect(checkLiftPlan(level, 0)).toEqual({ ok: true })
    expect(checkLiftPlan(level, -1)).toMatchObject({ ok: false, reason: expect.stringContaining('datum') })
    expect(checkLiftPlan(level, 0, { maxThicknessUm: 100 * MM })).toMatchObject({ ok: false, reason: expect.stringContaining('thickness') })
    expect(checkLiftPlan({ kind: 'parallel-to-base', thicknessUm: 0 }, 0)).toMatchObject({ ok: false })
    expect(() => cellLayers(level, -1, 100)).toThrow(RangeError)
  })

  const anyPlan: fc.Arbitrary<LiftPlan> = fc
    .record({
      kind: fc.constantFrom('level' as const, 'parallel-to-base' as const, 'down-from-design' as const),
      thicknessUm: fc.integer({ min: 100 * MM, max: 600 * MM }),
    })
    .map(({ kind, thicknessUm }) => (kind === 'level' ? { kind, datumUm: -500 * MM, thicknessUm } : { kind, thicknessUm }))

  it('tiles base to design without gaps, none thicker than the limit, all on the rail', () => {
    const elevation = fc.integer({ min: -500 * MM, max: 4000 * MM })
    const limitShare = fc.double({ min: 1, max: 2, noNaN: true })
    fc.assert(
      fc.property(anyPlan, elevation, elevation, limitShare, (plan, baseUm, designUm, share) => {
        const limitUm = Math.ceil(plan.thicknessUm * share)
        const layers = cellLayers(plan, baseUm, designUm, { maxThicknessUm: limitUm })
        if (designUm <= baseUm) {
          expect(layers).toEqual([])
          return
        }
        expect(layers[0]?.bottomUm).toBe(baseUm)
        expect(layers.at(-1)?.topUm).toBe(designUm)
        const rail = new Map(railBands(plan, Math.max(-500 * MM, baseUm - 300 * MM), designUm + 700 * MM).map((band) => [band.lift, band]))
        layers.forEach((layer, i) => {
          const next = layers[i + 1]
          expect(layer.topUm - layer.bottomUm).toBeGreaterThan(0)
          expect(layer.topUm - layer.bottomUm).toBeLessThanOrEqual(limitUm)
          expect(layer.lift).toBeGreaterThanOrEqual(1)
          expect(rail.has(layer.lift)).toBe(true)
          if (next === undefined) return
          expect(next.bottomUm).toBe(layer.topUm)
          expect(next.lift).toBeGreaterThan(layer.lift)
        })
      }),
      { ...SEEDED, numRuns: 1000 },
    )
  })

  it('leaves no layer under half a lift where the default limit applies and a neighbour has room', () => {
    const elevation = fc.integer({ min: 0, max: 4000 * MM })
    fc.assert(
      fc.property(anyPlan, elevation, elevation, (plan, baseUm, heightUm) => {
        const layers = cellLayers(plan, baseUm, baseUm + heightUm)
        layers.forEach((layer, i) => {
          const thickness = layer.topUm - layer.bottomUm
          if (2 * thickness >= plan.thicknessUm) return
          for (const other of [layers[i - 1], layers[i + 1]]) {
            if (other) expect(other.topUm - other.bottomUm + thickness).toBeGreaterThan(1.5 * plan.thicknessUm)
          }
        })
      }),
      { ...SEEDED, numRuns: 500 },
    )
  })

  it('agrees on lift numbers across a level zone: any two cells share their whole bands', () => {
    const a = cellLayers(level, 0, 1000 * MM)
    const b = cellLayers(level, 310 * MM, 950 * MM)
    expect(b.map(({ lift }) => lift)).toEqual([3, 4, 5])
    expect(layerAt(b, 500 * MM)?.lift).toBe(layerAt(a, 500 * MM)?.lift)
  })
})

describe('the layer at an elevation', () => {
  const layers = cellLayers(level, 200 * MM, 800 * MM)

  it('is the lower of two at their boundary', () => {
    expect(layerAt(layers, 400 * MM)?.lift).toBe(2)
    expect(layerAt(layers, 400 * MM + 1)?.lift).toBe(3)
    expect(layerAt(layers, 800 * MM)?.lift).toBe(4)
    expect(layerAt(layers, 800 * MM + 1)).toBeUndefined()
  })

  it('is the foundation, lift 0, at the ground and below', () => {
    expect(liftAtElevation(layers, 200 * MM)).toBe(0)
    expect(liftAtElevation(layers, 201 * MM)).toBe(2)
    expect(liftAtElevation(layers, 801 * MM)).toBeUndefined()
    expect(liftAtElevation([], 0)).toBeUndefined()
  })
})

describe('the layer of a test', () => {
  const layers = cellLayers(level, 0, 800 * MM)
  const test = (surfaceMm: number, depthMm: number, toleranceUm?: number) =>
    testLayer(layers, surfaceMm * MM, depthMm * MM, toleranceUm === undefined ? {} : { toleranceUm })

  it('holds its surface less half its depth', () => {
    expect(test(600, 200)).toEqual({ ok: true, lift: 3, layer: { lift: 3, bottomUm: 400 * MM, topUm: 600 * MM }, warnings: [] })
    // probed from the next lift's surface: half the depth down is exactly the boundary, which belongs to the lift below
    expect(test(700, 200)).toMatchObject({ ok: true, lift: 3 })
    expect(test(701, 200)).toMatchObject({ ok: true, lift: 4 })
  })

  it('warns when the depth stops short of the layer or passes into the one below', () => {
    expect(test(600, 150)).toMatchObject({ lift: 3, warnings: ['short-of-layer'] })
    expect(test(600, 250)).toMatchObject({ lift: 3, warnings: ['into-layer-below'] })
    expect(test(600, 190, 12 * MM)).toMatchObject({ lift: 3, warnings: [] })
  })

  it('is the foundation below the fill, and none above the design', () => {
    expect(test(0, 200)).toEqual({ ok: true, lift: 0, layer: undefined, warnings: [] })
    expect(test(950, 200)).toMatchObject({ ok: false, reason: expect.stringContaining('above the planned top') })
    expect(test(600, 0)).toMatchObject({ ok: false, reason: expect.stringContaining('depth') })
    expect(testLayer([], 0, 100)).toMatchObject({ ok: false, reason: expect.stringContaining('No fill') })
  })
})

describe('the rail of a zone', () => {
  it('shows the planned bands between the lowest ground and the highest design', () => {
    expect(railBands(level, 250 * MM, 650 * MM)).toEqual([
      { lift: 2, bottomUm: 250 * MM, topUm: 400 * MM },
      { lift: 3, bottomUm: 400 * MM, topUm: 600 * MM },
      { lift: 4, bottomUm: 600 * MM, topUm: 650 * MM },
    ])
    expect(railBands(level, 250 * MM, 250 * MM)).toEqual([])
  })
})
