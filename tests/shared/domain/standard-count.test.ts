import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { AVERAGED_DAYS, checkStability, judgeCount, judgeCounts, type GaugeCalibration, type StandardCount } from '#shared/domain/standard-count.ts'

const CALIBRATION: GaugeCalibration = { calibratedOn: '2026-03-01', dueOn: null, recordedAt: 0, density: 2_000, moisture: 600 }
const dayOf = (index: number) => new Date(Date.UTC(2026, 2, 2 + index)).toISOString().slice(0, 10)
const count = (index: number, density: number, moisture = 600, change: Partial<StandardCount> = {}): StandardCount => ({
  id: `c${index}`,
  day: dayOf(index),
  countedAt: Date.parse(`${dayOf(index)}T14:00:00Z`),
  recordedAt: 0,
  voided: false,
  density,
  moisture,
  ...change,
})
const verdicts = (counts: readonly StandardCount[]) => judgeCounts([CALIBRATION], counts).judged.map((each) => [each.count.id, each.judgement?.good, each.reference?.from])

describe('a standard count against its reference', () => {
  // gauge operating manual: 1 % density, 2 % moisture
  it('is within at 1 % of density and 2 % of moisture, exactly on the limit too', () => {
    expect(judgeCount({ density: 2_020, moisture: 588 }, CALIBRATION)).toMatchObject({ good: true, densityPercent: 1, moisturePercent: -2, reasons: [] })
    expect(judgeCount({ density: 2_020.1, moisture: 600 }, CALIBRATION)).toMatchObject({ good: false, densityGood: false, moistureGood: true })
    expect(judgeCount({ density: 1_979.9, moisture: 612.1 }, CALIBRATION).reasons.map((reason) => reason.code)).toEqual(['standard-count-density', 'standard-count-moisture'])
  })

  it('is the same whatever the counting time multiplies both by', () => {
    const pair = fc.record({ density: fc.integer({ min: 500, max: 9_000 }), moisture: fc.integer({ min: 200, max: 3_000 }) })
    fc.assert(
      fc.property(pair, pair, fc.constantFrom(0.25, 0.5, 2, 4, 16), (counted, reference, k) => {
        const scaled = judgeCount({ density: counted.density * k, moisture: counted.moisture * k }, { density: reference.density * k, moisture: reference.moisture * k })
        expect(scaled.good).toBe(judgeCount(counted, reference).good)
      }),
    )
  })
})

describe('the counts of a gauge, day by day', () => {
  it('compares the first four days with the calibration, then with the average of the last four', () => {
    const drifting = [2_005, 2_010, 2_015, 2_020, 2_030, 2_035]
    const { judged } = judgeCounts([CALIBRATION], drifting.map((density, index) => count(index, density)))
    // 2,030 is 1.5 % from the calibration's 2,000, and 0.86 % from the average 2,012.5 of the four days before
    expect(judged.map((each) => [each.reference?.from, each.reference?.density, each.judgement?.good])).toEqual([
      ['calibration', 2_000, true],
      ['calibration', 2_000, true],
      ['calibration', 2_000, true],
      ['calibration', 2_000, true],
      ['average', 2_012.5, true],
      ['average', (2_010 + 2_015 + 2_020 + 2_030) / 4, true],
    ])
    expect(judged[4]?.reference?.days).toEqual([0, 1, 2, 3].map(dayOf))
  })

  it('keeps a bad day out of the average, and out of the first four', () => {
    const counts = [count(0, 2_000), count(1, 2_100), count(2, 2_000), count(3, 2_000), count(4, 2_004), count(5, 2_004)]
    expect(verdicts(counts)).toEqual([['c0', true, 'calibration'], ['c1', false, 'calibration'], ['c2', true, 'calibration'], ['c3', true, 'calibration'], ['c4', true, 'calibration'], ['c5', true, 'average']])
    expect(judgeCounts([CALIBRATION], counts, dayOf(6)).next).toMatchObject({ from: 'average', density: 2_002, days: [2, 3, 4, 5].map(dayOf) })
  })

  it('lets the last count of a day that is not void stand, good or bad, all against one reference', () => {
    const at = (id: string, minute: number, density: number, voided = false) => count(0, density, 600, { id, countedAt: minute, voided })
    const standing = (counts: readonly StandardCount[]) => judgeCounts([CALIBRATION], counts).judged.find((each) => each.stands)
    expect(standing([at('a', 1, 2_100), at('b', 2, 2_001)])).toMatchObject({ count: { id: 'b' }, judgement: { good: true } })
    expect(standing([at('a', 1, 2_001), at('b', 2, 2_100)])).toMatchObject({ count: { id: 'b' }, judgement: { good: false } })
    expect(standing([at('a', 1, 2_001), at('b', 2, 2_100, true)])).toMatchObject({ count: { id: 'a' }, judgement: { good: true } })
    expect(standing([at('a', 1, 2_001, true)])).toBeUndefined()
  })

  it('starts again with a new calibration, and judges nothing before the first', () => {
    const again: GaugeCalibration = { ...CALIBRATION, calibratedOn: dayOf(4), recordedAt: 1, density: 3_000 }
    const { judged } = judgeCounts([CALIBRATION, again], [...[0, 1, 2, 3].map((index) => count(index, 2_000)), count(4, 3_000), count(-5, 2_000)])
    expect(judged.map((each) => [each.count.day, each.reference?.density, each.judgement?.good ?? each.refused?.code])).toEqual([
      [dayOf(-5), undefined, 'not-calibrated'],
      ...[0, 1, 2, 3].map((index) => [dayOf(index), 2_000, true]),
      [dayOf(4), 3_000, true],
    ])
  })

  const someCounts = fc
    .array(fc.record({ index: fc.integer({ min: 0, max: 9 }), density: fc.integer({ min: 1_960, max: 2_060 }), moisture: fc.integer({ min: 580, max: 625 }), minute: fc.integer({ min: 0, max: 600 }), voided: fc.boolean() }), { maxLength: 30 })
    .map((rows) => rows.map(({ index, minute, ...row }, id) => count(index, row.density, row.moisture, { id: `c${id}`, voided: row.voided, countedAt: minute })))

  it('does not depend on the order in which counts and voids arrive', () => {
    fc.assert(
      fc.property(someCounts.chain((counts) => fc.tuple(fc.constant(counts), fc.shuffledSubarray(counts, { minLength: counts.length }))), ([counts, shuffled]) => {
        expect(judgeCounts([CALIBRATION], shuffled)).toEqual(judgeCounts([CALIBRATION], counts))
      }),
    )
  })

  it('judges the others as if a void count had never been', () => {
    fc.assert(
      fc.property(someCounts, (counts) => {
        const standing = (rows: readonly StandardCount[]) => judgeCounts([CALIBRATION], rows).judged.filter((each) => each.stands)
        expect(standing(counts)).toEqual(standing(counts.filter((each) => !each.voided)))
      }),
    )
  })

  it('averages four good standing days at most, all before the day and each once', () => {
    fc.assert(
      fc.property(someCounts, (counts) => {
        const { judged } = judgeCounts([CALIBRATION], counts)
        for (const { reference, count: own } of judged) {
          if (reference?.from !== 'average') continue
          expect(reference.days).toHaveLength(AVERAGED_DAYS)
          expect(reference.days.every((day) => day < own.day && judged.some((each) => each.count.day === day && each.stands && each.judgement?.good === true))).toBe(true)
        }
      }),
    )
  })
})

describe('the stability check of five counts', () => {
  const five = (last: number) => [2_000, 2_000, 2_000, 2_000, last].map((density) => ({ density, moisture: 600 }))
  // (max − min) < 1 % density, < 2 % moisture
  it('is stable below 1 % of density and 2 % of moisture', () => {
    expect(checkStability(five(2_019))).toMatchObject({ ok: true, stable: true })
    expect(checkStability(five(2_030))).toMatchObject({ ok: true, stable: false })
    expect(checkStability([600, 600, 606, 600, 612].map((moisture) => ({ density: 2_000, moisture })))).toMatchObject({ ok: true, stable: true })
    expect(checkStability([594, 600, 606, 600, 612].map((moisture) => ({ density: 2_000, moisture })))).toMatchObject({ ok: true, stable: false })
  })

  it('is exactly at the limit when the range is 1 % of the mean, which is out', () => {
    expect(checkStability([1_990, 2_010, 2_000, 2_000, 2_000].map((density) => ({ density, moisture: 600 })))).toEqual({ ok: true, stable: false, densityPercent: 1, moisturePercent: 0 })
  })

  it('says what it lacks', () => {
    expect(checkStability(five(2_000).slice(1))).toMatchObject({ ok: false, reason: { code: 'five-counts' } })
    expect(checkStability(five(0))).toMatchObject({ ok: false, reason: { code: 'not-positive' } })
  })
})
