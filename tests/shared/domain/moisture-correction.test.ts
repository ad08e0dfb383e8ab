import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { moistureFromGauge } from '#shared/domain/moisture.ts'
import { moistureCorrection } from '#shared/domain/moisture-correction.ts'

describe('the site correction of gauge moisture', () => {
  it('is +18.18 where the gauge reads 10 % and the oven 12 %', () => {
    // 1000 (12 − 10) / 110 = 18.18, the formula from memory and computed there
    expect(moistureCorrection([{ oven: 12, gauge: 10 }])).toMatchObject({ ok: true, value: { pairs: [expect.closeTo(18.1818, 4)] } })
  })

  it('averages several pairs and gives their spread', () => {
    const correction = moistureCorrection([{ oven: 12, gauge: 10 }, { oven: 11, gauge: 10 }, { oven: 10, gauge: 10 }])
    expect(correction).toMatchObject({ ok: true, value: { k: expect.closeTo(9.0909, 4), least: 0, greatest: expect.closeTo(18.1818, 4) } })
  })

  it('brings the gauge to the oven again for a single pair', () => {
    const percent = fc.double({ min: 1, max: 60, noNaN: true })
    fc.assert(
      fc.property(percent, percent, (oven, gauge) => {
        const correction = moistureCorrection([{ oven, gauge }])
        // a gauge reading w over a soil of unit dry density: water w, wet 100 + w
        if (correction.ok) expect(moistureFromGauge(100 + gauge, gauge, correction.value.k)).toBeCloseTo(oven, 8)
        expect(correction.ok).toBe(true)
      }),
    )
  })

  it('says what it lacks', () => {
    expect(moistureCorrection([])).toMatchObject({ ok: false, reason: { code: 'no-pairs' } })
    expect(moistureCorrection([{ oven: 12, gauge: -1 }])).toMatchObject({ ok: false, reason: { code: 'moisture-range' } })
  })
})
