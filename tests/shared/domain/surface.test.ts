import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Surface, SurveyPoint } from '#shared/domain/surface.ts'
import { makeSurface, planeSurface } from '#shared/domain/surface.ts'
import { SEEDED } from './plan-arbitraries.ts'

function surfaceOf(points: readonly SurveyPoint[]): Surface {
  const result = makeSurface(points)
  if (!result.ok) throw new Error(result.reason)
  return result.surface
}

describe('a surface through survey points', () => {
  const roof = surfaceOf([
    { u: 0, v: 0, zUm: 0 },
    { u: 10_000, v: 0, zUm: 0 },
    { u: 10_000, v: 9_000, zUm: 0 },
    { u: 0, v: 9_000, zUm: 0 },
    { u: 5_000, v: 4_500, zUm: 3_000_000 },
  ])

  it('is exact at the points and flat between them', () => {
    expect(roof.elevationAt({ u: 5_000, v: 4_500 })).toEqual({ ok: true, um: 3_000_000 })
    expect(roof.elevationAt({ u: 0, v: 0 })).toEqual({ ok: true, um: 0 })
    expect(roof.elevationAt({ u: 5_000, v: 2_250 })).toEqual({ ok: true, um: 1_500_000 })
    expect(roof.elevationAt({ u: 2_500, v: 4_500 })).toEqual({ ok: true, um: 1_500_000 })
  })

  it('knows nothing beyond its points', () => {
    expect(roof.elevationAt({ u: 10_001, v: 100 })).toEqual({ ok: false, reason: 'The place lies outside the surveyed points.' })
    expect(roof.elevationAt({ u: -50_000, v: -50_000 })).toMatchObject({ ok: false })
  })

  it('says why there can be none', () => {
    const line = [0, 1, 2, 3].map((k) => ({ u: 1000 * k, v: 500 * k, zUm: k }))
    expect(makeSurface(line)).toEqual({ ok: false, reason: 'The points of the surface all lie on one line.' })
    expect(makeSurface(line.slice(0, 2))).toMatchObject({ ok: false, reason: expect.stringContaining('three or more') })
    const twice = [...line, { u: 1000, v: 500, zUm: 99 }]
    expect(makeSurface(twice)).toEqual({ ok: false, reason: 'Points 2 and 5 are at the same place with different elevations.' })
  })

  // a plane is reproduced by any triangulation of its points: the outside value is the plane itself
  it('gives a plane back everywhere inside its outline, on grids and on scattered points', () => {
    const plane = planeSurface({ u: 0, v: 0, zUm: 5_000_000 }, { uPercent: 2, vPercent: -1.5 })
    const heightOf = (u: number, v: number) => {
      const at = plane.elevationAt({ u, v })
      return at.ok ? at.um : Number.NaN
    }
    const along = fc.integer({ min: 0, max: 400 }).map((k) => k * 500)
    const scattered = fc.array(fc.tuple(along, along), { minLength: 0, maxLength: 60 })
    const edges = [0, 40_000, 80_000, 120_000, 160_000, 200_000]
    const rim = edges.flatMap((k) => [[k, 0], [k, 200_000], [0, k], [200_000, k]] as [number, number][])
    const share = fc.integer({ min: 1, max: 199_999 })
    fc.assert(
      fc.property(scattered, share, share, (inner, u, v) => {
        const surface = surfaceOf([...rim, ...inner].map(([pu, pv]) => ({ u: pu, v: pv, zUm: heightOf(pu, pv) })))
        const at = surface.elevationAt({ u, v })
        expect(at.ok && Math.abs(at.um - heightOf(u, v))).toBeLessThanOrEqual(1)
      }),
      { ...SEEDED, numRuns: 150 },
    )
  })

  it('answers everywhere inside the outline of scattered points, hair-thin gaps included', () => {
    // a shallow arc of points along one side, where a triangulation leaves gaps beneath the outline
    const arc = Array.from({ length: 41 }, (_, k) => ({ u: k * 5_000, v: -Math.round(30 * Math.sin((k * Math.PI) / 40)), zUm: 1_000_000 }))
    const surface = surfaceOf([...arc, { u: 0, v: 90_000, zUm: 1_000_000 }, { u: 200_000, v: 90_000, zUm: 1_000_000 }])
    for (let u = 1_000; u < 200_000; u += 1_000) {
      expect(surface.elevationAt({ u, v: 1 })).toEqual({ ok: true, um: 1_000_000 })
      expect(surface.elevationAt({ u, v: 0 })).toEqual({ ok: true, um: 1_000_000 })
    }
    expect(surface.elevationAt({ u: 100_000, v: -20 })).toEqual({ ok: true, um: 1_000_000 })
  })
})

describe('a plane surface', () => {
  it('is level without a slope, and rises by its percents', () => {
    expect(planeSurface({ u: 7, v: 8, zUm: 42 }).elevationAt({ u: 9_999, v: -5 })).toEqual({ ok: true, um: 42 })
    const sloped = planeSurface({ u: 0, v: 0, zUm: 0 }, { uPercent: 2, vPercent: -1 })
    // 10 m at 2 % is 200 mm up; 10 m at −1 % is 100 mm down
    expect(sloped.elevationAt({ u: 10_000, v: 0 })).toEqual({ ok: true, um: 200_000 })
    expect(sloped.elevationAt({ u: 10_000, v: 10_000 })).toEqual({ ok: true, um: 100_000 })
  })
})
