import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { GaugeMoistureSheet, NuclearGaugeSheet } from '#shared/domain/field-sheets.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import { moistureBesideWall, WALL_CONVENTIONS, wallOffset, type WallOffset } from '#shared/domain/wall-offset.ts'

const sheet = (wall: WallOffset | undefined, change: Partial<NuclearGaugeSheet> = {}, moistureDensity = 16): NuclearGaugeSheet => {
  const moisture: GaugeMoistureSheet = { method: 'gauge', densityUnit: 'pcf', moistureDensity, correctionK: 0, wall }
  return { method: 'nuclear-gauge', mode: 'direct-transmission', lengthUnit: 'in', rodDepth: 6, densityUnit: 'pcf', wetDensity: 132, moisture, ...change }
}
const flagsOf = (raw: NuclearGaugeSheet) => {
  const reduced = reduceSheet(raw)
  return reduced.ok ? reduced.flags.map((flag) => flag.code) : reduced.problems.map((problem) => [problem.field, problem.code])
}

describe('the moisture correction beside a wall', () => {
  it('is signed as its convention says', () => {
    // one maker's offset = count on the block in the trench − daily moisture standard count, another's MS − M
    expect(wallOffset(668, 641, 'block-minus-standard')).toBe(27)
    expect(wallOffset(668, 641, 'standard-minus-block')).toBe(-27)
  })

  it('gives the same moisture by both conventions', () => {
    // 16 pcf read, 2 pcf of it from the wall: w = 14 / (132 − 14)
    for (const wall of [{ convention: 'block-minus-standard', appliedBy: 'here', offset: 2 }, { convention: 'standard-minus-block', appliedBy: 'here', offset: -2 }] as const) {
      expect(reduceSheet(sheet(wall))).toMatchObject({ ok: true, moisture: expect.closeTo((100 * 14) / 118, 9), flags: [] })
    }
    fc.assert(
      fc.property(fc.double({ min: 0, max: 30, noNaN: true }), fc.double({ min: -10, max: 10, noNaN: true }), (read, offset) => {
        const by = (convention: WallOffset['convention'], signed: number) => moistureBesideWall(read, { convention, appliedBy: 'here', offset: signed })
        expect(by('block-minus-standard', offset)).toBeCloseTo(by('standard-minus-block', -offset), 12)
      }),
    )
  })

  it('changes nothing where the gauge has corrected its reading, and never the wet density', () => {
    for (const convention of WALL_CONVENTIONS) {
      const offset = convention === 'block-minus-standard' ? 27 : -27
      expect(reduceSheet(sheet({ convention, appliedBy: 'gauge', offset }))).toEqual(reduceSheet(sheet(undefined)))
      expect(reduceSheet(sheet({ convention, appliedBy: 'here', offset: offset / 20 }))).toMatchObject({ wetDensity: (reduceSheet(sheet(undefined)) as { wetDensity: number }).wetDensity })
    }
  })

  it('asks about a sign that a wall does not have, and about backscatter', () => {
    expect(flagsOf(sheet({ convention: 'block-minus-standard', appliedBy: 'here', offset: -2 }))).toEqual(['wall-offset-sign'])
    expect(flagsOf(sheet({ convention: 'standard-minus-block', appliedBy: 'gauge', offset: 27 }))).toEqual(['wall-offset-sign'])
    expect(flagsOf(sheet({ convention: 'block-minus-standard', appliedBy: 'gauge', offset: 27 }, { mode: 'backscatter', rodDepth: 0 }))).toEqual(['wall-backscatter'])
  })

  it('refuses an offset that is missing or takes the water below zero', () => {
    expect(flagsOf(sheet({ convention: 'block-minus-standard', appliedBy: 'here', offset: Number.NaN }))).toEqual([['moisture.wall.offset', 'missing']])
    expect(flagsOf(sheet({ convention: 'block-minus-standard', appliedBy: 'here', offset: 20 }))).toEqual([['moisture.wall.offset', 'moisture-range']])
  })

  it('is taken off the water of a dry density too', () => {
    // 118 pcf dry with 14 pcf of its own water
    const wall: WallOffset = { convention: 'block-minus-standard', appliedBy: 'here', offset: 2 }
    const plain = { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: 118, moisture: { method: 'gauge', densityUnit: 'pcf', moistureDensity: 16, correctionK: 0, wall } } as const
    expect(reduceSheet(plain)).toMatchObject({ ok: true, moisture: expect.closeTo((100 * 14) / 118, 9) })
  })
})
