import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { correctForOversize, oversizeSieve } from '#shared/domain/oversize.ts'
import type { OversizeReference } from '#shared/domain/oversize.ts'
import type { CoarsePart } from '#shared/domain/verdict-types.ts'
import { convertDensity } from '#shared/units/density.ts'

const stones: CoarsePart = { bulkGravity: 2.78, moisture: 0, sieve: '3/4-in' }
const fine = { maxDryDensity: 1910, optimumMoisture: 13.7, gs: 2.7 }

function corrected(...args: Parameters<typeof correctForOversize>): OversizeReference {
  const result = correctForOversize(...args)
  if (!result.ok) throw new Error(result.reason.message)
  return result.value
}
const code = (...args: Parameters<typeof correctForOversize>) => {
  const result = correctForOversize(...args)
  return result.ok ? 'accepted' : result.reason.code
}

describe('oversize correction', () => {
  test('O-2: 1.91 Mg/m³, 13.7 %, 20 % stones of Gs 2.78 is 2.0375 Mg/m³ and 10.96 % (Smith, Elements of Soil Mechanics, Ex. 14.2)', () => {
    const { maxDryDensity, optimumMoisture } = corrected(fine, 20, stones)
    expect(maxDryDensity / 1000).toBeCloseTo(2.0375, 4)
    expect(optimumMoisture).toBeCloseTo(10.96, 9)
  })

  test('O-3: 140.4 pcf, 27 % of Gsb 2.697, 10.6 and 2.1 % is 146.98 pcf and 8.3 % (T 99 annex example, from memory)', () => {
    const result = corrected(
      { maxDryDensity: 140.4, optimumMoisture: 10.6, gs: 2.7 }, 27,
      { bulkGravity: 2.697, moisture: 2.1, sieve: 'no-4' }, { waterDensity: 62.4 },
    )
    expect(result.maxDryDensity).toBeCloseTo(146.98, 1)
    expect(result.optimumMoisture).toBeCloseTo(8.3, 1)
  })

  test('the T 99 annex form Dd = 100·Df·k/(Df·Pc + k·Pf) is the same number (form from memory)', () => {
    fc.assert(
      fc.property(fc.double({ min: 1500, max: 2200, noNaN: true }), fc.integer({ min: 5, max: 30 }), fc.double({ min: 2.4, max: 3, noNaN: true }), (df, pc, gm) => {
        const k = 1000 * gm
        const annex = (100 * df * k) / (df * pc + k * (100 - pc))
        expect(corrected({ ...fine, maxDryDensity: df }, pc, { ...stones, bulkGravity: gm }).maxDryDensity).toBeCloseTo(annex, 8)
      }),
      { seed: 20261201, numRuns: 200 },
    )
  })

  test('combined Gs is 1/(Pf/Gs + Pc/Gm) (domain section 2)', () => {
    expect(corrected(fine, 20, stones).gs).toBeCloseTo(1 / (0.8 / 2.7 + 0.2 / 2.78), 12)
  })

  test('nothing changes below 5 % (T 99 and T 180), and it does at 5; a site may set another share', () => {
    expect(corrected(fine, 4.9, undefined)).toEqual({ ...fine, corrected: false })
    expect(corrected(fine, 5, stones).corrected).toBe(true)
    expect(corrected(fine, 9, undefined, { threshold: 10 }).corrected).toBe(false)
    expect(corrected(fine, 0, undefined, { threshold: 0 }).corrected).toBe(false)
  })

  test('refused beyond the limits of D4718: 40 % on the No. 4, 30 % on the 3/4 in (scribd.com 371482774)', () => {
    expect(code(fine, 30, stones)).toBe('accepted')
    expect(code(fine, 30.1, stones)).toBe('oversize-beyond')
    expect(code(fine, 40, { ...stones, sieve: 'no-4' })).toBe('accepted')
    expect(code(fine, 40.5, { ...stones, sieve: 'no-4' })).toBe('oversize-beyond')
  })

  test('refused without the stones’ gravity, or with a share that is none', () => {
    expect(code(fine, 12, undefined)).toBe('oversize-gravity')
    expect(code(fine, 12, { ...stones, bulkGravity: Number.NaN })).toBe('oversize-gravity')
    expect(code(fine, -1, stones)).toBe('oversize-range')
    expect(code(fine, Number.NaN, stones)).toBe('oversize-range')
  })

  test('does not depend on the unit of density', () => {
    const inPcf = corrected({ ...fine, maxDryDensity: convertDensity(1910, 'kg/m3', 'pcf') }, 20, stones, { waterDensity: convertDensity(1000, 'kg/m3', 'pcf') })
    expect(convertDensity(inPcf.maxDryDensity, 'pcf', 'kg/m3')).toBeCloseTo(corrected(fine, 20, stones).maxDryDensity, 8)
  })

  test('the sieve follows the method (D698-07, T 99/T 180)', () => {
    expect(['A', 'B', 'C'].map((l) => oversizeSieve('D698', l as 'A'))).toEqual(['no-4', '3/8-in', '3/4-in'])
    expect(['A', 'B', 'C', 'D'].map((l) => oversizeSieve('T 180', l as 'A'))).toEqual(['no-4', 'no-4', '3/4-in', '3/4-in'])
  })
})
