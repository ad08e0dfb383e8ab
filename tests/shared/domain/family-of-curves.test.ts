import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { CURVE_OFF_LIMIT, curveOff, fitFamily } from '#shared/domain/family-of-curves.ts'
import type { FamilyFit, FamilyMember } from '#shared/domain/family-of-curves.ts'
import { shapeOf } from '#shared/domain/family-member.ts'
import { convertDensity } from '#shared/units/density.ts'

const kg = (pcf: number) => convertDensity(pcf, 'pcf', 'kg/m3')
const METHOD = { method: 'T 99', procedure: 'A' } as const

/** A made-up curve over a peak, steeper the denser the soil (AASHTO R 75: denser soils have steeper curves, optimum drier). */
function member(id: string, maximum: number, optimum: number, change: Partial<FamilyMember> = {}): FamilyMember {
  const steep = maximum / 700
  const points = [-0.36, -0.2, -0.08, 0.06, 0.2].map((share) => ({ moisture: optimum * (1 + share), dryDensity: kg(maximum - steep * (10 * share) ** 2) }))
  return { id, code: id, ...METHOD, points, pair: { maxDryDensity: kg(maximum), optimumMoisture: optimum }, gs: 2.7, ...change }
}

const FAMILY = [member('A', 130, 9), member('B', 122, 11.5), member('C', 114, 14.5), member('D', 106, 18)]

function fit(moisture: number, pcf: number, members: readonly FamilyMember[] = FAMILY): FamilyFit {
  return fitFamily({ members, point: { moisture, dryDensity: kg(pcf) }, compacted: METHOD, waterDensity: 1000 })
}
/** a point on a member at a share of its optimum */
function onMember(of: FamilyMember, share: number) {
  const moisture = of.pair.optimumMoisture * share
  return { moisture, dryDensity: shapeOf(of).densityAt(moisture) ?? Number.NaN }
}
const fitPoint = (point: { moisture: number; dryDensity: number }, members: readonly FamilyMember[] = FAMILY) => fitFamily({ members, point, compacted: METHOD, waterDensity: 1000 })

function found(result: FamilyFit): Extract<FamilyFit, { ok: true }> {
  if (!result.ok) throw new Error(result.reason.message)
  return result
}
const reason = (result: FamilyFit) => (result.ok ? (result.unusable?.code ?? 'usable') : result.reason.code)

// The rules are those of the AASHTO T 272 field procedure and of R 75.
describe('fitFamily', () => {
  it('gives a point on a curve that curve’s pair (T 272, first rule)', () => {
    fc.assert(
      fc.property(fc.constantFrom(...FAMILY), fc.double({ min: 0.8, max: 1, noNaN: true }), (of, share) => {
        const result = found(fitPoint(onMember(of, share)))
        expect(result).toMatchObject({ on: 'curve', members: [of.id], pair: of.pair, usable: true })
        expect(result.shareOfOptimum).toBeCloseTo(100 * share, 6)
      }),
    )
  })

  it('gives a point between two curves a peak between theirs on the spine, and a curve through the point (second rule)', () => {
    const index = fc.integer({ min: 0, max: 2 })
    const share = fc.double({ min: 0.82, max: 0.99, noNaN: true })
    const part = fc.double({ min: 0.15, max: 0.85, noNaN: true })
    fc.assert(
      fc.property(index, share, part, (i, x, t) => {
        const [a, b] = [FAMILY[i], FAMILY[i + 1]]
        if (!a || !b) throw new Error('There are four curves')
        const lerp = (low: number, high: number) => low + (high - low) * t
        const [low, high] = [onMember(a, x), onMember(b, x)]
        const point = { moisture: lerp(low.moisture, high.moisture), dryDensity: lerp(low.dryDensity, high.dryDensity) }
        const result = found(fitPoint(point))
        if (result.on === 'curve') return // within 0.5 pcf of a member
        expect(result.members).toEqual([a.id, b.id])
        expect(result.pair.maxDryDensity).toBeCloseTo(lerp(a.pair.maxDryDensity, b.pair.maxDryDensity), 4)
        expect(result.pair.optimumMoisture).toBeCloseTo(lerp(a.pair.optimumMoisture, b.pair.optimumMoisture), 6)
        expect(result.usable).toBe(true)
        const near = result.drawn.reduce((best, each) => (Math.abs(each.moisture - point.moisture) < Math.abs(best.moisture - point.moisture) ? each : best))
        expect(Math.abs(near.dryDensity - point.dryDensity)).toBeLessThan(kg(1))
      }),
    )
  })

  it('gives a denser point at one moisture never a lighter curve', () => {
    fc.assert(
      fc.property(fc.double({ min: 7.4, max: 8.9, noNaN: true }), fc.double({ min: 100, max: 130, noNaN: true }), fc.double({ min: 0, max: 10, noNaN: true }), (moisture, pcf, more) => {
        const [lighter, denser] = [fit(moisture, pcf), fit(moisture, pcf + more)]
        if (!lighter.ok || !denser.ok) return
        expect(denser.pair.maxDryDensity).toBeGreaterThanOrEqual(lighter.pair.maxDryDensity - 1e-6)
        expect(denser.pair.optimumMoisture).toBeLessThanOrEqual(lighter.pair.optimumMoisture + 1e-9)
      }),
    )
  })

  it('depends neither on the order of the curves nor on the unit they were typed in', () => {
    const inKn = (density: number) => convertDensity(convertDensity(density, 'kg/m3', 'kN/m3'), 'kN/m3', 'kg/m3')
    const typed = FAMILY.map((of) => ({ ...of, points: of.points.map((p) => ({ ...p, dryDensity: inKn(p.dryDensity) })), pair: { ...of.pair, maxDryDensity: inKn(of.pair.maxDryDensity) } }))
    fc.assert(
      fc.property(fc.double({ min: 7.5, max: 17, noNaN: true }), fc.double({ min: 100, max: 128, noNaN: true }), fc.shuffledSubarray(typed, { minLength: 4 }), (moisture, pcf, shuffled) => {
        const [one, other] = [fit(moisture, pcf), fitFamily({ members: shuffled, point: { moisture, dryDensity: inKn(kg(pcf)) }, compacted: METHOD, waterDensity: 1000 })]
        expect(reason(other)).toBe(reason(one))
        if (one.ok && other.ok) expect(other.pair.maxDryDensity).toBeCloseTo(one.pair.maxDryDensity, 5)
      }),
    )
  })

  it('uses a point from 80 to 100 % of the optimum only, and says what to mould (third rule)', () => {
    const [, b] = FAMILY
    if (!b) throw new Error('There are four curves')
    expect(reason(fitPoint(onMember(b, 0.8)))).toBe('usable')
    expect(reason(fitPoint(onMember(b, 1)))).toBe('usable')
    const dry = found(fitPoint(onMember(b, 0.75)))
    // 80 % of 11.5 is 9.2
    expect([dry.usable, dry.unusable?.code, dry.unusable?.message]).toEqual([false, 'too-dry', expect.stringContaining('9.2 to 11.5 %')])
    const alone = found(fitPoint(onMember(b, 1.1), [b]))
    expect(alone.unusable?.code).toBe('wet-of-optimum')
  })

  it('does not extrapolate: denser, lighter, wetter and drier than the family are said so', () => {
    expect(reason(fit(8.5, 134))).toBe('above-family')
    expect(reason(fit(16, 97))).toBe('below-family')
    expect(reason(fit(19.5, 95))).toBe('wet-of-family')
    expect(reason(fit(10.5, 126.5))).toBe('above-spine')
    expect(reason(fit(5.2, 117))).toBe('drier-than-measured')
  })

  it('refuses curves or a point of another method or letter, a point above zero air voids, and curves that cross', () => {
    expect(reason(fitFamily({ members: FAMILY, point: { moisture: 10, dryDensity: kg(118) }, compacted: { method: 'T 99', procedure: 'C' }, waterDensity: 1000 }))).toBe('other-method')
    expect(reason(fit(10, 118, [...FAMILY, member('E', 118, 13, { procedure: 'D' })]))).toBe('other-method')
    // Gs 2.7 at 15 %: 2.7·62.43/(1 + 0.15·2.7) = 120.0 pcf
    expect(reason(fit(15, 121))).toBe('above-zero-air-voids')
    expect(reason(fit(10, 118, [member('A', 130, 12), member('B', 122, 10), member('C', 114, 15)]))).toBe('family-crosses')
    expect(reason(fit(10, 118, []))).toBe('no-family')
    expect(reason(fit(Number.NaN, 118))).toBe('bad-point')
  })

  it('warns of a family of fewer than three curves (R 75)', () => {
    expect(found(fit(9.6, 117, FAMILY.slice(0, 3))).warnings).toEqual([])
    const two = fit(9.6, 117, FAMILY.slice(0, 3).filter((of) => of.id !== 'B'))
    expect(two.warnings.map((warning) => warning.code)).toEqual(['small-family'])
  })
})

describe('curveOff', () => {
  it('says how far the curve in use is off, beyond 2 pcf or 1.5 points', () => {
    const [a, b, c] = FAMILY
    if (!a || !b || !c) throw new Error('There are four curves')
    const onB = fitPoint(onMember(b, 0.9))
    expect(curveOff(b.pair, onB)).toEqual({ dryDensity: 0, moisture: 0, off: false })
    expect(curveOff(a.pair, onB)).toMatchObject({ moisture: -2.5, off: true })
    expect(curveOff(a.pair, onB)?.dryDensity).toBeCloseTo(kg(8), 6)
    const near = { maxDryDensity: b.pair.maxDryDensity + CURVE_OFF_LIMIT.dryDensity, optimumMoisture: b.pair.optimumMoisture - CURVE_OFF_LIMIT.moisture }
    expect(curveOff(near, onB)?.off).toBe(false)
    expect(curveOff({ ...near, maxDryDensity: near.maxDryDensity + 0.1 }, onB)?.off).toBe(true)
    expect(curveOff({ ...near, optimumMoisture: near.optimumMoisture - 0.01 }, onB)?.off).toBe(true)
  })

  it('says nothing by a point that may not be used', () => {
    const [, b] = FAMILY
    if (!b) throw new Error('There are four curves')
    expect(curveOff(b.pair, fitPoint(onMember(b, 0.75)))).toBeNull()
    expect(curveOff(b.pair, fit(8.5, 134))).toBeNull()
  })
})
