import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { tieLocalGrid, toLocal, toSystem } from '#shared/domain/local-grid.ts'
import type { ControlPoint } from '#shared/domain/local-grid.ts'

/** A local grid 30° turned, in feet, over a system in metres: 0.3048 m a foot (exact definition). */
const TURN = Math.PI / 6
const place = (easting: number, northing: number) => ({
  easting: 500_000 + 0.3048 * (easting * Math.cos(TURN) - northing * Math.sin(TURN)),
  northing: 4_000_000 + 0.3048 * (easting * Math.sin(TURN) + northing * Math.cos(TURN)),
})
const CORNERS = [[5_000, 5_000], [6_000, 5_000], [6_000, 5_800], [5_000, 5_800]] as const
const control = (shift: Record<string, number> = {}): ControlPoint[] =>
  CORNERS.map(([easting, northing], i) => {
    const name = `CP${i + 1}`
    const system = place(easting, northing)
    return { name, local: { easting, northing }, system: { ...system, easting: system.easting + (shift[name] ?? 0) } }
  })

function tied(points: readonly ControlPoint[], tolerance = 0.02) {
  const tie = tieLocalGrid(points, tolerance)
  if (!tie.ok) throw new Error(tie.reason)
  return tie
}

describe('tieLocalGrid', () => {
  it('finds the scale and turn the control points were made with', () => {
    const tie = tied(control())
    expect(tie.scale).toBeCloseTo(0.3048, 12)
    expect(tie.rotationDeg).toBeCloseTo(30, 9)
    expect(tie.rms).toBeLessThan(1e-6)
    expect(tie.bad).toBeNull()
  })

  it('fits two points exactly', () => {
    const tie = tied(control().slice(0, 2))
    expect(tie.rms).toBe(0)
    for (const { distance } of tie.residuals) expect(distance).toBeLessThan(1e-6)
  })

  it('names the one point of four that is a foot off', () => {
    const tie = tied([...control({ CP3: 0.3048 }), { name: 'CP5', local: { easting: 5_500, northing: 5_400 }, system: place(5_500, 5_400) }])
    expect(tie.bad).toBe('CP3')
    expect(tie.residuals.toSorted((a, b) => b.distance - a.distance)[0]?.name).toBe('CP3')
  })

  it('names none of three, since any two of them fit', () => {
    const tie = tied(control({ CP3: 0.3048 }).slice(0, 3))
    expect(tie.rms).toBeGreaterThan(0.02)
    expect(tie.bad).toBeNull()
  })

  it('names none where all are within the tolerance', () => {
    expect(tied(control({ CP3: 0.02 })).bad).toBeNull()
  })

  it('refuses fewer than two points, points at one place and points without numbers', () => {
    const [first] = control()
    if (first === undefined) throw new Error('no control')
    expect(tieLocalGrid([first], 0.02)).toMatchObject({ ok: false, code: 'too-few' })
    expect(tieLocalGrid([first, { ...first, name: 'CP9' }], 0.02)).toMatchObject({ ok: false, code: 'same-place' })
    expect(tieLocalGrid([first, { ...first, local: { easting: NaN, northing: 1 } }], 0.02)).toMatchObject({ ok: false, code: 'not-a-number' })
  })

  // property: what was tied by exact points leads there and back
  it('goes to the system and back', () => {
    const { similarity } = tied(control())
    const coordinate = fc.double({ min: -1e5, max: 1e5, noNaN: true })
    fc.assert(
      fc.property(coordinate, coordinate, (easting, northing) => {
        const back = toLocal(similarity, toSystem(similarity, { easting, northing }))
        expect(back.easting).toBeCloseTo(easting, 4)
        expect(back.northing).toBeCloseTo(northing, 4)
      }),
    )
  })

  // property: no similarity near the least-squares one leaves a smaller sum of squares
  it('leaves the least sum of squares', () => {
    const points = control({ CP1: 0.05, CP4: -0.08 })
    const { similarity } = tied(points)
    const loss = (s: typeof similarity) => points.reduce((sum, { local, system }) => sum + (toSystem(s, local).easting - system.easting) ** 2 + (toSystem(s, local).northing - system.northing) ** 2, 0)
    const least = loss(similarity)
    const nudge = fc.double({ min: -1, max: 1, noNaN: true })
    fc.assert(
      fc.property(nudge, nudge, (da, dc) => {
        expect(loss({ ...similarity, a: similarity.a + da * 1e-6, c: similarity.c + dc * 1e-2 })).toBeGreaterThanOrEqual(least - 1e-9)
      }),
    )
  })
})
