import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import type { LabPoint } from '#shared/domain/curve-points.ts'
import { dryDensityOf } from '#shared/domain/phase-relations.ts'
import { fitReferenceCurve, sampleCurve } from '#shared/domain/reference-curve.ts'
import type { CurveInput, FittedCurve } from '#shared/domain/reference-curve.ts'
import { roundToPlace } from '#shared/domain/rounding.ts'
import { convertDensity } from '#shared/units/density.ts'

const toPcf = (kg: number) => convertDensity(kg, 'kg/m3', 'pcf')
const fromPcf = (pcf: number) => convertDensity(pcf, 'pcf', 'kg/m3')

function fitted(input: CurveInput): FittedCurve {
  const fit = fitReferenceCurve(input)
  if (!fit.ok) throw new Error(fit.reason.message)
  return fit
}

// Extra data, seen only on answer sites: judged by their recomputed columns.
const P3_MASSES = [
  [1.68, 9.9], [1.71, 10.6], [1.77, 12.1], [1.83, 13.8], [1.86, 15.1], [1.88, 17.4], [1.87, 19.4], [1.85, 21.2],
] as const
const P3_DRY = [1620.5, 1639, 1673.9, 1704.7, 1713.1, 1697.6, 1660.3, 1618.2]
const P3: LabPoint[] = P3_MASSES.map(([kg, moisture]) => ({ moisture, dryDensity: dryDensityOf((kg * 1e6) / 943.3, moisture) }))
const inPcf = (rows: readonly (readonly [number, number])[]): LabPoint[] =>
  rows.map(([moisture, pcf]) => ({ moisture, dryDensity: fromPcf(pcf) }))
const P4 = inPcf([[8.4, 122.2], [10.2, 126.3], [11.7, 127.4], [12.7, 127.5], [14, 125]])
const P5 = inPcf(([[3.26, 8.4], [4.15, 10.2], [4.67, 12.3], [4.02, 14.6], [3.63, 16.8]] as const).map(([lb, w]) => [w, dryDensityOf(lb * 30, w)]))
const P6 = inPcf(([[6.1, 6.5], [6.4, 9.3], [6.7, 13.3], [6.8, 16.6], [6.6, 21.2]] as const).map(([lb, w]) => [w, dryDensityOf(lb / 0.055, w)]))
const P7 = inPcf(([[116.7, 9.1], [122.8, 11.8], [127.7, 14.8], [130, 16.5], [127.6, 18.9]] as const).map(([wet, w]) => [w, dryDensityOf(wet, w)]))

describe('points from masses', () => {
  test('P-3: eight specimens in 943.3 cm³ reduce to the recomputed densities (scribd.com 338454874)', () => {
    // The page's own values are off by up to 2.4 kg/m³ in four rows; the recomputed column gates.
    P3.forEach((point, i) => expect(Math.abs(point.dryDensity - (P3_DRY[i] ?? 0))).toBeLessThan(0.06))
  })

  test('P-5: pounds in a mould of 1/30 ft³ reduce to the recomputed pcf (unifolks.com 275)', () => {
    const expected = [90.22, 112.98, 124.76, 105.24, 93.24]
    P5.forEach((point, i) => expect(toPcf(point.dryDensity)).toBeCloseTo(expected[i] ?? 0, 2))
  })

  test('P-6 and P-7 reduce to their recomputed columns (answerhappy.com 187713, transtutors.com 13407725)', () => {
    const p6 = [104.14, 106.46, 107.52, 106.03, 99.01]
    P6.forEach((point, i) => expect(toPcf(point.dryDensity)).toBeCloseTo(p6[i] ?? 0, 2))
    const p7 = [106.97, 109.84, 111.24, 111.59, 107.32]
    P7.forEach((point, i) => expect(Math.abs(toPcf(point.dryDensity) - (p7[i] ?? 0))).toBeLessThan(0.01))
  })

  test('P-8: the printed dry values do not follow from bulk and moisture; ours are the correct ones (highwayqualitytest.com)', () => {
    const rows = [[2.18, 6.5, 2.047], [2.28, 7.5, 2.121], [2.4, 8.5, 2.212], [2.35, 9.5, 2.146]] as const
    for (const [bulk, w, dry] of rows) expect(dryDensityOf(bulk, w)).toBeCloseTo(dry, 3)
  })
})

describe('the fitted pair', () => {
  test.each([
    // "Natural cubic spline through the points", checks 3, recomputed with a general-purpose library.
    ['P-3', P3, 2.7, (kg: number) => kg, 1713.2, 15.26, 0.06],
    ['P-4', P4, 2.85, toPcf, 127.62, 12.35, 0.006],
    ['P-5', P5, 2.72, toPcf, 125.06, 12.05, 0.006],
    ['P-6', P6, 2.7, toPcf, 107.54, 12.82, 0.006],
    ['P-7', P7, 2.7, toPcf, 111.71, 16.04, 0.006],
  ] as const)('%s: the spline gives the recomputed maximum and optimum', (_, points, gs, unit, maximum, optimum, tolerance) => {
    const { spline, pair, used } = fitted({ points, gs })
    expect(used).toBe('spline')
    expect(pair).toEqual(spline)
    expect(Math.abs(unit(spline.maxDryDensity) - maximum)).toBeLessThan(tolerance)
    expect(Math.abs(spline.optimumMoisture - optimum)).toBeLessThan(0.006)
  })

  // To one unit of the last place given: P-6's cubic is at 12.827 %, listed as 12.82.
  test.each([
    ['P-3 quadratic', P3, 2.7, 'quadratic', (kg: number) => kg, 1710, 15.48, 0.5],
    ['P-4 quadratic', P4, 2.85, 'quadratic', toPcf, 127.57, 11.76, 0.006],
    ['P-4 cubic', P4, 2.85, 'cubic', toPcf, 127.66, 11.92, 0.006],
    ['P-5 quadratic', P5, 2.72, 'quadratic', toPcf, 120, 12.53, 0.06],
    ['P-5 cubic', P5, 2.72, 'cubic', toPcf, 121.6, 11.66, 0.06],
    ['P-6 cubic', P6, 2.7, 'cubic', toPcf, 107.6, 12.82, 0.06],
    ['P-7 quadratic', P7, 2.7, 'quadratic', toPcf, 111.5, 14.3, 0.06],
    ['P-7 cubic', P7, 2.7, 'cubic', toPcf, 111.7, 15.19, 0.06],
  ] as const)('%s: least squares gives the recomputed pair', (_, points, gs, name, unit, maximum, optimum, tolerance) => {
    const fit = fitted({ points, gs })[name]
    if (!fit.ok) throw new Error(fit.reason.message)
    expect(Math.abs(unit(fit.maxDryDensity) - maximum)).toBeLessThan(tolerance)
    expect(Math.abs(fit.optimumMoisture - optimum)).toBeLessThan(0.01)
  })

  test('P-5: the cubic is said not to be concave, and the quadratic misses the highest point by 4.7 pcf', () => {
    const { cubic } = fitted({ points: P5, gs: 2.72 })
    expect(cubic).toMatchObject({ ok: true, concave: false })
    const least = fitted({ points: P5, gs: 2.72, use: 'quadratic' })
    expect(124.76 - toPcf(least.pair.maxDryDensity)).toBeCloseTo(4.7, 1)
    expect(least.warnings.find((w) => w.code === 'point-above-maximum')?.message).toContain('4.7')
  })

  test('Das 5.8 on P-3: 1705 kg/m³ moist at 10.5 % is 1542.99 dry, 90.1 % of 1713.1 (recomputed)', () => {
    const dry = dryDensityOf(1705, 10.5)
    expect(dry).toBeCloseTo(1542.99, 2)
    expect((100 * dry) / 1713.1).toBeCloseTo(90.1, 1)
  })

  test('P-2: 98 % of 127.2 pcf is 124.656, reported 124.7 (Navy Engineering Aid manual, tpub.com/inteng/13a1.htm)', () => {
    expect(roundToPlace(127.2 * 0.98, 1, 'even')).toBe(124.7)
  })

  test('nominal energies: W·h·blows·layers/V (computed)', () => {
    const energy = (lb: number, ft: number, blows: number, layers: number, ft3: number) => (lb * ft * blows * layers) / ft3
    expect(energy(5.5, 1, 25, 3, 1 / 30)).toBeCloseTo(12_375, 6)
    expect(energy(10, 1.5, 25, 5, 1 / 30)).toBeCloseTo(56_250, 6)
    expect(energy(5.5, 1, 56, 3, 0.075)).toBeCloseTo(12_320, 6)
    expect(energy(10, 1.5, 56, 5, 0.075)).toBeCloseTo(56_000, 6)
  })
})

describe('refusals', () => {
  const code = (input: CurveInput) => {
    const fit = fitReferenceCurve(input)
    return fit.ok ? 'accepted' : fit.reason.code
  }

  test('fewer than four points', () => expect(code({ points: P4.slice(0, 3), gs: 2.85 })).toBe('too-few-points'))

  test('no point on one side of the peak', () => {
    expect(code({ points: inPcf([[8, 100], [10, 105], [12, 109], [14, 112]]), gs: 2.7 })).toBe('no-peak')
    expect(code({ points: inPcf([[8, 112], [10, 109], [12, 105], [14, 100]]), gs: 2.7 })).toBe('no-peak')
    expect(code({ points: inPcf([[8, 100], [10, 100], [12, 100], [14, 100]]), gs: 2.7 })).toBe('no-peak')
  })

  test('P-4 with Gs 2.70: its points stand above the zero-air-voids line, and the assumed Gs is named', () => {
    const fit = fitReferenceCurve({ points: P4, gs: 2.7 })
    expect(fit).toMatchObject({ ok: false, reason: { code: 'above-zero-air-voids' } })
    if (!fit.ok) expect(fit.reason.message).toContain('assumed Gs of 2.7')
    expect(code({ points: P4, gs: 2.7, gsMeasured: true })).toBe('above-zero-air-voids')
  })

  test('moistures that are not distinct', () => {
    expect(code({ points: [...P6, { moisture: 13.3, dryDensity: 1700 }], gs: 2.7 })).toBe('moistures-not-distinct')
  })

  test('values that are none, and a specific gravity that no soil has', () => {
    expect(code({ points: [...P6, { moisture: Number.NaN, dryDensity: 1700 }], gs: 2.7 })).toBe('bad-point')
    expect(code({ points: [...P6, { moisture: 12, dryDensity: 107 }], gs: 2.7 })).toBe('bad-point')
    expect(code({ points: P6, gs: 27 })).toBe('gs-range')
    expect(code({ points: P6, gs: 2.7, waterDensity: 62.4 })).toBe('water-density')
  })

  test('a chosen fit that has no maximum', () => {
    const points = inPcf([[8, 110], [10, 111], [12, 104], [14, 103], [16, 109]])
    expect(code({ points, gs: 2.7, use: 'quadratic' })).toBe('no-maximum')
  })
})

describe('warnings', () => {
  const codes = (input: CurveInput) => fitted(input).warnings.map((warning) => warning.code)

  test('P-9: fits that differ are said, and whoever confirms must know (discussion in the Nemotron-CC-Math extract)', () => {
    expect(codes({ points: P4, gs: 2.85 })).toContain('fits-differ')
    expect(codes({ points: P5, gs: 2.72 })).toContain('fits-differ')
    const { confirmKnowingly, difference } = fitted({ points: P5, gs: 2.72 })
    expect(confirmKnowingly).toBe(true)
    expect(toPcf(difference.dryDensity)).toBeCloseTo(125.06 - 120, 0)
  })

  test('a well-shaped curve has none', () => {
    const points = [8.6, 10.6, 12.6, 14.6, 16.6].map((w) => ({ moisture: w, dryDensity: 1884 - 5 * (w - 12.6) ** 2 }))
    const fit = fitted({ points, gs: 2.68 })
    expect(fit.warnings).toEqual([])
    expect(fit.confirmKnowingly).toBe(false)
  })

  test('few or distant points on a side are said (P-6: 4 and 4.6 % apart)', () => {
    expect(codes({ points: P6, gs: 2.7 })).toContain('wide-spacing')
    expect(codes({ points: P7, gs: 2.7 })).not.toContain('few-points-wet')
    expect(codes({ points: inPcf([[9, 107], [10.5, 110], [12, 113], [13.5, 112]]), gs: 2.9 })).toContain('few-points-wet')
    expect(codes({ points: inPcf([[9, 113], [10, 113.2], [11.5, 111], [13, 107]]), gs: 2.9 })).toContain('few-points-dry')
  })

  test('two summits point at a bad point', () => {
    expect(codes({ points: inPcf([[8, 108], [10, 113], [12, 108], [14, 112], [16, 104]]), gs: 2.75 })).toContain('several-summits')
  })

  test('a peak far from the usual saturation asks to check Gs', () => {
    const { warnings, peakSaturation } = fitted({ points: P6, gs: 3.4 })
    expect(warnings.map((w) => w.code)).toContain('peak-saturation')
    expect(peakSaturation).toBeLessThan(75)
  })
})

describe('properties', () => {
  const curve = fc.record({
    optimum: fc.double({ min: 10, max: 18, noNaN: true }),
    maximum: fc.double({ min: 1550, max: 1800, noNaN: true }),
    bend: fc.double({ min: 2, max: 6, noNaN: true }),
  })

  test('a parabola sampled anywhere gives its own top, whatever the order of the points', () => {
    fc.assert(
      fc.property(curve, fc.integer({ min: 0, max: 5 }), ({ optimum, maximum, bend }, turn) => {
        const points = [-4, -2.5, -1, 0.7, 2.2, 3.8].map((d) => ({ moisture: optimum + d, dryDensity: maximum - bend * d * d }))
        const turned = [...points.slice(turn), ...points.slice(0, turn)]
        const { spline, quadratic } = fitted({ points: turned, gs: 3.2 })
        expect(spline).toEqual(fitted({ points, gs: 3.2 }).spline)
        if (!quadratic.ok) throw new Error(quadratic.reason.message)
        expect(quadratic.maxDryDensity).toBeCloseTo(maximum, 6)
        expect(quadratic.optimumMoisture).toBeCloseTo(optimum, 6)
        expect(Math.abs(spline.maxDryDensity - maximum)).toBeLessThan(2)
        expect(spline.maxDryDensity).toBeGreaterThanOrEqual(Math.max(...points.map((p) => p.dryDensity)))
      }),
      { seed: 20261201, numRuns: 200 },
    )
  })

  test('any points at all give a finite fit or a reason, never a throw', () => {
    const number = fc.oneof(fc.double(), fc.double({ min: 5, max: 25, noNaN: true }), fc.double({ min: 1400, max: 2000, noNaN: true }))
    const point = fc.record({ moisture: number, dryDensity: number })
    fc.assert(
      fc.property(fc.array(point, { maxLength: 8 }), fc.double(), (points, gs) => {
        for (const g of [gs, 2.7]) {
          const fit = fitReferenceCurve({ points, gs: g })
          if (fit.ok) {
            expect(Number.isFinite(fit.pair.maxDryDensity)).toBe(true)
            expect(Number.isFinite(fit.pair.optimumMoisture)).toBe(true)
          } else expect(fit.reason.message.length).toBeGreaterThan(10)
        }
      }),
      { seed: 20261201, numRuns: 500 },
    )
  })

  test('the curve is drawn from end to end and no further', () => {
    const samples = sampleCurve(P7, 50)
    expect(samples).toHaveLength(50)
    expect(samples[0]?.moisture).toBe(9.1)
    expect(samples.at(-1)?.moisture).toBe(18.9)
    expect(samples.at(-1)?.dryDensity).toBeCloseTo(fromPcf(127.6 / 1.189), 6)
    const { curveAt, spline } = fitted({ points: P7, gs: 2.7 })
    expect(curveAt(spline.optimumMoisture)).toBeCloseTo(spline.maxDryDensity, 8)
    expect(curveAt(9)).toBeUndefined()
    expect(curveAt(19)).toBeUndefined()
    expect(sampleCurve(P7.slice(0, 1), 50)).toEqual([])
    expect(sampleCurve(P7, 1)).toEqual([])
  })
})
