import fc from 'fast-check'
import { mean } from 'simple-statistics'
import { describe, expect, it } from 'vitest'
import { reduceEntry } from '#shared/domain/compaction-specimen.ts'
import type { CurveEntry } from '#shared/domain/compaction-specimen.ts'
import { convertDensity } from '#shared/units/density.ts'

function reduced(entry: CurveEntry) {
  const result = reduceEntry(entry)
  if (!result.ok) throw new Error(result.problems.map((problem) => `${problem.field}: ${problem.message}`).join('; '))
  return result
}
const dry = (entry: CurveEntry, unit: 'kg/m3' | 'pcf') => reduced(entry).points.map((point) => convertDensity(point.dryDensity, 'kg/m3', unit))
const problems = (entry: CurveEntry) => {
  const result = reduceEntry(entry)
  return result.ok ? [] : result.problems.map(({ field, code }) => `${field} ${code}`)
}
const specimens = (rows: readonly (readonly [mass: number, percent: number])[]) => rows.map(([mouldAndSoil, percent]) => ({ mouldAndSoil, moisture: { percent } }))
const inMould = (massUnit: 'kg' | 'lb', volume: Pick<Extract<CurveEntry, { kind: 'masses' }>, 'volumeUnit' | 'mouldVolume'>, rows: readonly (readonly [number, number])[], mould = 0): CurveEntry =>
  ({ kind: 'masses', massUnit, mould, ...volume, specimens: specimens(rows.map(([mass, percent]) => [mass + mould, percent])) })

const P3 = [[1.68, 9.9], [1.71, 10.6], [1.77, 12.1], [1.83, 13.8], [1.86, 15.1], [1.88, 17.4], [1.87, 19.4], [1.85, 21.2]] as const

describe('reduceEntry', () => {
  it('P-3: eight specimens in 943.3 cm³ (Das; the page’s own dry densities err by up to 2.4 kg/m³, so the recomputed ones)', () => {
    const expected = [1620.5, 1639.0, 1673.9, 1704.7, 1713.1, 1697.6, 1660.3, 1618.2]
    dry(inMould('kg', { volumeUnit: 'cm3', mouldVolume: 943.3 }, P3), 'kg/m3').forEach((density, i) => expect(density).toBeCloseTo(expected[i] ?? 0, 1))
    // the mould weighed with the soil or taken off beforehand comes to the same
    dry(inMould('kg', { volumeUnit: 'cm3', mouldVolume: 943.3 }, P3, 4.2), 'kg/m3').forEach((density, i) => expect(density).toBeCloseTo(expected[i] ?? 0, 1))
  })

  it('P-5: five specimens in 1/30 ft³ (Das chapter 6; wet unit weights are the masses times 30, Ohio CA-EW-4)', () => {
    const rows = [[3.26, 8.4], [4.15, 10.2], [4.67, 12.3], [4.02, 14.6], [3.63, 16.8]] as const
    const expected = [90.22, 112.98, 124.76, 105.24, 93.24]
    dry(inMould('lb', { volumeUnit: 'ft3', mouldVolume: 1 / 30 }, rows), 'pcf').forEach((density, i) => expect(density).toBeCloseTo(expected[i] ?? 0, 1))
    dry(inMould('lb', { volumeUnit: 'ft3', mouldVolume: 1 / 30 }, rows), 'pcf').forEach((density, i) => {
      const [mass, percent] = rows[i] ?? [0, 0]
      expect(density).toBeCloseTo((30 * mass) / (1 + percent / 100), 9)
    })
  })

  it('P-6: five specimens in 0.055 ft³ (answerhappy.com 187713, recomputed)', () => {
    const rows = [[6.1, 6.5], [6.4, 9.3], [6.7, 13.3], [6.8, 16.6], [6.6, 21.2]] as const
    const expected = [104.14, 106.46, 107.52, 106.03, 99.01]
    dry(inMould('lb', { volumeUnit: 'ft3', mouldVolume: 0.055 }, rows), 'pcf').forEach((density, i) => expect(density).toBeCloseTo(expected[i] ?? 0, 2))
  })

  it('P-7: wet unit weights with their moisture (transtutors.com 13407725, recomputed)', () => {
    const rows = [[116.7, 9.1], [122.8, 11.8], [127.7, 14.8], [130.0, 16.5], [127.6, 18.9]] as const
    const entry: CurveEntry = { kind: 'wet', densityUnit: 'pcf', specimens: rows.map(([density, percent]) => ({ density, moisture: { percent } })) }
    const expected = [106.97, 109.84, 111.24, 111.59, 107.32]
    dry(entry, 'pcf').forEach((density, i) => expect(density).toBeCloseTo(expected[i] ?? 0, 2))
  })

  it('P-8: catches a sheet whose dry densities are not its wet ones over 1 + w (highwayqualitytest.com; correct are 2.047, 2.121, 2.212, 2.146)', () => {
    const rows = [[2.05, 2.18, 6.5], [2.18, 2.28, 7.5], [2.33, 2.4, 8.5], [2.26, 2.35, 9.5]] as const
    const entry: CurveEntry = { kind: 'dry', densityUnit: 'g/cm3', specimens: rows.map(([density, wetDensity, percent]) => ({ density, wetDensity, moisture: { percent } })) }
    expect(reduced(entry).flags.map(({ specimen, code }) => [specimen, code])).toEqual([[1, 'stated-dry-off'], [2, 'stated-dry-off'], [3, 'stated-dry-off']])
    const right: CurveEntry = { ...entry, specimens: [2.047, 2.121, 2.212, 2.146].map((density, i) => ({ density, wetDensity: rows[i]?.[1], moisture: { percent: rows[i]?.[2] ?? 0 } })) }
    expect(reduced(right).flags).toEqual([])
  })

  it('M-2: averages the tins of a specimen (scribd.com 532149593: 16.231, 15.964 and 16.451 %, mean 16.215, unrounded)', () => {
    const tins = [{ tin: 17.31, wetAndTin: 43.52, dryAndTin: 39.86 }, { tin: 18.92, wetAndTin: 52.19, dryAndTin: 47.61 }, { tin: 16.07, wetAndTin: 39.43, dryAndTin: 36.13 }]
    const [point] = reduced({ kind: 'wet', densityUnit: 'pcf', specimens: [{ density: 120, moisture: { massUnit: 'g', tins } }] }).points
    expect(point?.moisture).toBeCloseTo(16.215, 3)
    expect(point?.moisture).toBeCloseTo(mean([16.231, 15.964, 16.451]), 2)
  })

  it('names every field that cannot be', () => {
    const entry: CurveEntry = { kind: 'masses', massUnit: 'g', volumeUnit: 'cm3', mould: 4200, mouldVolume: 0, specimens: [{ mouldAndSoil: 4200, moisture: { percent: 8 } }, { mouldAndSoil: Number.NaN, moisture: { massUnit: 'g', tins: [{ wetAndTin: 50, dryAndTin: 60, tin: 20 }] } }] }
    expect(problems(entry)).toEqual(['mouldVolume not-positive', 'specimens.0.mouldAndSoil no-soil', 'specimens.1.mouldAndSoil missing', 'specimens.1.moisture.tins.0.dryAndTin dry-heavier'])
    expect(problems({ kind: 'dry', densityUnit: 'pcf', specimens: [{ density: -1, moisture: { percent: 201 } }] })).toEqual(['specimens.0.density negative', 'specimens.0.moisture.percent moisture-range'])
  })

  // property: entered as masses, as wet or as dry density, a specimen is the same point
  it('comes to one point, however it is written down', () => {
    fc.assert(
      fc.property(fc.double({ min: 1500, max: 2300, noNaN: true }), fc.double({ min: 0.5, max: 40, noNaN: true }), (wet, percent) => {
        const moisture = { percent }
        const byMass = reduced({ kind: 'masses', massUnit: 'g', volumeUnit: 'cm3', mould: 4000, mouldVolume: 944, specimens: [{ mouldAndSoil: 4000 + (944 * wet) / 1000, moisture }] }).points[0]
        const byWet = reduced({ kind: 'wet', densityUnit: 'kg/m3', specimens: [{ density: wet, moisture }] }).points[0]
        const byDry = reduced({ kind: 'dry', densityUnit: 'kg/m3', specimens: [{ density: wet / (1 + percent / 100), wetDensity: wet, moisture }] })
        expect(byMass?.dryDensity).toBeCloseTo(byWet?.dryDensity ?? 0, 6)
        expect(byDry.points[0]?.dryDensity).toBeCloseTo(byWet?.dryDensity ?? 0, 6)
        expect(byDry.flags).toEqual([])
      }),
    )
  })
})
