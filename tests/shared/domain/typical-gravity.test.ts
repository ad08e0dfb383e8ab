import { describe, expect, it } from 'vitest'
import { fitReferenceCurve } from '#shared/domain/reference-curve.ts'
import { TYPICAL_GRAVITIES, unusualGravity } from '#shared/domain/typical-gravity.ts'
import { specificGravitySchema } from '#shared/schemas/lab.ts'
import { pointsFromPcf } from '#tests/factories/curve.ts'

const rows = TYPICAL_GRAVITIES.flatMap((table) => table.rows)
const gravityOf = (name: string) => {
  const row = rows.find((each) => each.name === name)
  return row === undefined ? null : [row.low, row.high]
}

describe('typical specific gravities', () => {
  // civilengineering.blog/2020/02/14/specific-gravity
  it.each([
    ['Kaolinite', 2.64, 2.64], ['Illite', 2.6, 2.86], ['Montmorillonite', 2.75, 2.78], ['Halloysite', 2.55, 2.55], ['Chlorite', 2.6, 2.9],
    ['Attapulgite', 2.3, 2.3], ['Muscovite', 2.7, 3.1], ['Biotite', 3, 3.1], ['Potassium feldspar', 2.54, 2.587], ['Sodium and calcium feldspar', 2.62, 2.76],
    ['Calcite', 2.72, 2.72], ['Dolomite', 2.85, 2.85], ['Gypsum', 2.32, 2.32], ['Aragonite', 2.94, 2.94], ['Hornblende', 3.2, 3.5],
    ['Augite', 3.2, 3.4], ['Limonite', 3.8, 3.8], ['Hematite', 5.2, 5.2], ['Magnetite', 5.17, 5.17],
  ])('%s has %d to %d', (name, low, high) => expect(gravityOf(name)).toEqual([low, high]))

  // quartz: scholars.direct jpe-4-012, table 2; the soils: Army FM 5-472 (studylib.net 10727529)
  it('knows quartz, and the soils of the Army manual', () => {
    expect(gravityOf('Quartz')).toEqual([2.65, 2.65])
    expect(gravityOf('Inorganic soil')).toEqual([2.6, 2.8])
    expect(gravityOf('Quartz sand')).toEqual([2.65, 2.67])
    expect(gravityOf('Iron-rich laterite')?.[0]).toBe(2.75)
  })

  it('are all values a curve takes', () => {
    for (const { low, high } of rows) {
      expect(specificGravitySchema.safeParse(low).success).toBe(true)
      expect(specificGravitySchema.safeParse(high).success).toBe(true)
      expect(low).toBeLessThanOrEqual(high)
    }
  })

  it('says where a value is none of an inorganic soil', () => {
    expect(unusualGravity(2.6)).toBeNull()
    expect(unusualGravity(2.8)).toBeNull()
    expect(unusualGravity(2.81)).toContain('2.60 to 2.80')
    expect(unusualGravity(2.32)).not.toBeNull()
    expect(unusualGravity(Number.NaN)).toBeNull()
  })
})

describe('typical maxima', () => {
  // about 60 pcf for organic soil (optimum 35 %) to about 145 pcf for well-graded granular soil (5 %): scribd.com 35923257;
  // the denser a soil, the steeper its curve (AASHTO R 75)
  it.each([[60, 35, 1.9, 0.3], [145, 5, 2.7, 1.2]])('a curve over %d pcf at %d %% is taken', (maximum, optimum, gs, bend) => {
    const points = [-4, -2, 0, 2, 4].map((d) => [optimum + d, maximum - bend * d * d] as const)
    const fit = fitReferenceCurve({ points: pointsFromPcf(points), gs })
    if (!fit.ok) throw new Error(fit.reason.message)
    expect(fit.pair.optimumMoisture).toBeCloseTo(optimum, 6)
    expect(fit.warnings.map((warning) => warning.code)).not.toContain('several-summits')
  })
})
