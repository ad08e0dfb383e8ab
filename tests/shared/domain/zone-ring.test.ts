import { kinks, polygon } from '@turf/turf'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { SitePoint } from '#shared/domain/site-geometry.ts'
import { checkRing } from '#shared/domain/zone-ring.ts'
import { anyPolygon, SEEDED } from './plan-arbitraries.ts'

const ringOf = (...points: [number, number][]): SitePoint[] => points.map(([easting, northing]) => ({ easting, northing }))
const reasonOf = (ring: SitePoint[], boundary?: SitePoint[]) => {
  const result = checkRing(ring, boundary)
  return result.ok ? 'ok' : result.reason
}
const square = ringOf([0, 0], [100, 0], [100, 100], [0, 100])

describe('an outline', () => {
  it('is taken in either direction, convex or not', () => {
    expect(checkRing(square)).toEqual({ ok: true })
    expect(checkRing([...square].reverse())).toEqual({ ok: true })
    expect(checkRing(ringOf([0, 0], [50, 10], [100, 0], [100, 100], [50, 20], [0, 100]))).toEqual({ ok: true })
    fc.assert(
      fc.property(anyPolygon, (ring) => {
        expect(checkRing(ring)).toEqual({ ok: true })
      }),
      { ...SEEDED, numRuns: 100 },
    )
  })

  it('is refused with a reason that names the place', () => {
    expect(reasonOf(ringOf([0, 0], [1, 1]))).toBe('An outline needs three or more points.')
    expect(reasonOf(ringOf([0, 0], [1, NaN], [2, 0]))).toBe('Point 2 has no readable coordinates.')
    expect(reasonOf(ringOf([0, 0], [10, 0], [10, 0], [0, 10]))).toBe('Points 2 and 3 are at the same place.')
    expect(reasonOf(ringOf([0, 0], [10, 10], [10, 0], [0, 10]))).toBe('The outline crosses or touches itself: sides 1–2 and 3–4 meet.')
    expect(reasonOf(ringOf([0, 0], [10, 0], [5, 0]))).toContain('doubles back on itself at point 2')
    expect(reasonOf(ringOf([0, 0], [10, 0], [10, 10], [5, 0], [0, 10]))).toContain('touches itself')
  })

  it('crosses itself exactly where an independent check finds crossings', () => {
    const coordinate = fc.integer({ min: 0, max: 1000 })
    const points = fc.uniqueArray(fc.tuple(coordinate, coordinate), { minLength: 4, maxLength: 7, selector: (p) => p.join() })
    fc.assert(
      fc.property(points, (given) => {
        const crossings = kinks(polygon([[...given, given[0] ?? [0, 0]]])).features.length
        expect(checkRing(ringOf(...given)).ok).toBe(crossings === 0)
      }),
      { ...SEEDED, numRuns: 300 },
    )
  })
})

describe('a zone', () => {
  const notched = ringOf([0, 0], [100, 0], [100, 100], [60, 100], [50, 40], [40, 100], [0, 100])

  it('may fill its boundary or run along it', () => {
    expect(checkRing(square, square)).toEqual({ ok: true })
    expect(checkRing(notched, notched)).toEqual({ ok: true })
    expect(checkRing(ringOf([0, 0], [50, 0], [50, 40], [40.005, 100], [0, 100]), notched)).toEqual({ ok: true })
    expect(checkRing(ringOf([10, 10], [90, 10], [50, 30]), notched)).toEqual({ ok: true })
  })

  it('is refused where a point or a side leaves the boundary', () => {
    expect(reasonOf(ringOf([10, 10], [120, 10], [50, 90]), square)).toBe("Point 2 is outside the site's boundary.")
    expect(reasonOf(ringOf([10, 90], [10, 10], [90, 10], [90, 90]), notched)).toBe("Side 4–1 runs outside the site's boundary.")
    // both ends on corners of the notch, the side bridging it
    expect(reasonOf(ringOf([40, 100], [10, 10], [60, 100]), notched)).toBe("Side 2–3 runs outside the site's boundary.")
    expect(reasonOf(ringOf([60, 100], [40, 100], [50, 5]), notched)).toContain('runs outside')
  })
})
