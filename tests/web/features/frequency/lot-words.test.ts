import { describe, expect, it } from 'vitest'
import { stakesToDraw } from '#web/data/lot/stakes-to-draw.ts'
import { blocksOf, fitsStanding, standingWords } from '#web/features/frequency/lot-words.ts'
import { sumOf, totalsOf } from '#web/features/frequency/lot-totals.ts'
import { makeUnits } from '#web/lib/units.ts'
import { buildLot, F_CM3 } from '#tests/factories/lot-view.ts'
import { buildOrder } from '#tests/factories/order-view.ts'
import { ZONE_ID } from '#tests/factories/site-view.ts'

const units = makeUnits('us', 'America/Los_Angeles')
const words = (...lot: Parameters<typeof buildLot>) => standingWords(buildLot(...lot), [], units)

describe('where a lot stands, in words', () => {
  it('names fresh tests and re-runs apart', () => {
    expect(words()).toEqual({ text: 'Owes 1, run 1 again', tone: 'bad' })
    expect(words({ standing: 'owes', reruns: 0 })).toEqual({ text: 'Owes 2', tone: 'bad' })
    expect(words({ standing: 'owes', owed: 0, reruns: 0 })).toEqual({ text: 'Ground waits for a test', tone: 'bad' })
  })

  it('names the order before what is owed beside it', () => {
    expect(standingWords(buildLot({ standing: 'rework', reruns: 0, owed: 0 }), [buildOrder()], units)).toEqual({ text: 'Rework R-014', tone: 'bad' })
    expect(standingWords(buildLot({ standing: 'rework', reruns: 0 }), [buildOrder()], units).text).toBe('Rework R-014, owes 2')
    expect(standingWords(buildLot({ standing: 'awaiting-retest', owed: 0, reruns: 0 }), [buildOrder()], units).text).toBe('R-014 waits for its retest')
  })

  it('says since when it is released', () => {
    expect(words({ standing: 'released', releasedAt: '2026-11-30T20:00:00.000Z' })).toEqual({ text: 'Released Nov 30', tone: 'good' })
    expect(words({ standing: 'waiting-release' })).toEqual({ text: 'Waiting for release', tone: 'good' })
  })
})

describe('a lot in the register', () => {
  it('is drawn as shares of what one test speaks for', () => {
    expect(blocksOf(buildLot())).toEqual([
      { state: 'meets-spec', share: 1 },
      { state: 'suspect', share: 1 },
      { state: 'owed', share: 1 },
      { state: 'owed', share: 0.5 },
    ])
    expect(blocksOf(buildLot({ fCm3: 0, blocks: [{ testId: null, state: 'owed', cm3: 5 }] }))).toEqual([{ state: 'owed', share: 1 }])
  })

  it('wants stakes for what is owed, without what is staked or is to be run again', () => {
    expect(stakesToDraw(buildLot())).toBe(1)
    expect(stakesToDraw(buildLot({ staked: 1 }))).toBe(0)
    expect(stakesToDraw(buildLot({ staked: 5 }))).toBe(0)
  })

  it('is found by its standing', () => {
    expect(fitsStanding(buildLot(), 'short')).toBe(true)
    expect(fitsStanding(buildLot({ standing: 'waiting-release', owed: 0, reruns: 0 }), 'short')).toBe(false)
    expect(fitsStanding(buildLot({ standing: 'waiting-acceptance' }), 'waiting')).toBe(true)
    expect(fitsStanding(buildLot({ standing: 'awaiting-retest' }), 'rework')).toBe(true)
  })
})

describe('running totals', () => {
  it('sum whole numbers by zone and material, and again to the board’s totals', () => {
    const lots = [buildLot(), buildLot({ id: 'b' }), buildLot({ id: 'c', materialId: 'pit', materialName: 'Pit run' }), buildLot({ id: 'd', zoneId: 'court' })]
    const totals = totalsOf(lots, [ZONE_ID, 'court'])
    expect(totals.map(({ zoneId, materialName, lots: count, volumeCm3, owed }) => [zoneId, materialName, count, volumeCm3, owed])).toEqual([
      [ZONE_ID, 'Pit run', 1, 4 * F_CM3, 2],
      [ZONE_ID, 'Ridge borrow', 2, 8 * F_CM3, 4],
      ['court', 'Ridge borrow', 1, 4 * F_CM3, 2],
    ])
    expect(sumOf(totals)).toMatchObject({ lots: 4, volumeCm3: 16 * F_CM3, spokenCm3: 4 * F_CM3, required: 16, taken: 8, passing: 4, owed: 8 })
  })
})
