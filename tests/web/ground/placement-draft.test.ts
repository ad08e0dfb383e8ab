import { describe, expect, it } from 'vitest'
import { buildCellColumns } from '#tests/factories/site-view.ts'
import { buildMaterial, buildPlan, buildSheet, buildTwoZoneSite } from '#tests/factories/ground-view.ts'
import { coveredConsequence, coveredTitle } from '#web/features/ground/tasks/place/covered-words.ts'
import { coversTooEarly, defaultLift, nextLiftOf, readPlacement, type PlacementDraft } from '#web/features/ground/tasks/place/placement-draft.ts'
import { makeUnits } from '#web/lib/units.ts'

const units = makeUnits('us', 'America/Los_Angeles')
const plan = buildPlan()
const material = buildMaterial()
const DRAFT: PlacementDraft = {
  lift: null,
  quarters: 15,
  materialId: material.id,
  happenedAt: '2026-12-01T08:30',
  loads: '',
  loadVolume: '',
  looseThickness: '',
  machine: ' Roller 2 ',
  passes: '',
  remarks: '',
}
const read = (cells: readonly number[], draft: Partial<PlacementDraft> = {}, surface = buildSheet()) =>
  readPlacement({ draft: { ...DRAFT, ...draft }, cells, plan, surface, materials: [material], units })

describe('the lift of a placement', () => {
  it('is the one most of the chosen cells take next, the lower one where two are as many', () => {
    const surface = buildSheet({ 0: { lift: 3, state: 'released' }, 1: { lift: 3, state: 'released' }, 2: { lift: 1, state: 'released' } })
    expect(defaultLift(plan, surface, [0, 1, 2])).toBe(4)
    expect(defaultLift(plan, surface, [0, 2])).toBe(2)
  })

  it('is the same lift again where the cell is only partly placed', () => {
    expect(nextLiftOf(plan, buildSheet({ 0: { lift: 2, state: 'awaiting-test', flags: ['partial'] } }), 0)).toBe(2)
  })

  it('is none at design grade', () => {
    const top = buildSheet({ 0: { lift: 10, state: 'released' } })
    expect(nextLiftOf(plan, top, 0)).toBeNull()
    expect(read([0], {}, top).problems.cells).toMatch(/at design grade/)
  })

  it('cannot be one that is already placed; the words and the cells to leave out say where', () => {
    const { problems, unfit, input } = read([0, 1], { lift: 2 }, buildSheet({ 1: { lift: 2, state: 'awaiting-test' } }))
    expect(problems.lift).toBe('Lift 2 is already placed in B1.')
    expect(unfit).toEqual([1])
    expect(input).toBeNull()
  })

  it('cannot be one that the plan does not hold in a cell', () => {
    expect(read([0], { lift: 11 }).problems.lift).toMatch(/^Lift 11 is not planned in A1/)
  })
})

describe('the cells of a placement', () => {
  it('lie in one zone, and two are refused by name', () => {
    expect(read([2, 3]).problems.cells).toBe('These cells lie in Building pad and Truck court. Place one zone at a time.')
    expect(read([2, 3]).input).toBeNull()
  })

  it('lie in a zone at all', () => {
    const columns = buildCellColumns()
    const open = buildPlan(buildTwoZoneSite(), { ...columns, zone: columns.zone.map((zone, cell) => (cell === 0 ? -1 : zone)) })
    const { problems } = readPlacement({ draft: DRAFT, cells: [0, 1], plan: open, surface: buildSheet(), materials: [material], units })
    expect(problems.cells).toBe('A1 lies outside every zone. Leave it out.')
  })
})

describe('the volume of a placement', () => {
  it('from area and thickness: two cells of 50 ft by 50 ft by 8 in are 123 cy', () => {
    const { volume } = read([0, 1])
    // 2 × 50 × 50 × (8/12) / 27 = 123.457 yd³
    expect(volume?.ok === true && units.volumeNumber(volume.geometryCm3)).toBe('123')
    expect(volume?.ok === true && volume.loadsCm3).toBeUndefined()
  })

  it('from loads through the material: 10 loads of 20 cy loose, half of it left, are 100 cy, 19 % less and flagged', () => {
    const { volume } = read([0, 1], { loads: '10', loadVolume: '20' })
    expect(volume?.ok === true && units.volumeNumber(volume.loadsCm3 ?? 0)).toBe('100')
    // 100 / 123.457 − 1 = −19.0 %
    expect(volume?.ok === true && volume.differencePercent).toBeCloseTo(-19.0, 6)
    expect(volume?.ok === true && volume.flagged).toBe(true)
  })

  it('is not flagged at 15 % or less: 11 loads are 10.9 % short', () => {
    const { volume } = read([0, 1], { loads: '11', loadVolume: '20' })
    expect(volume?.ok === true && volume.flagged).toBe(false)
  })

  it('counts the quarters of a single cell: one of four is 15 cy', () => {
    const { volume, input } = read([0], { quarters: 1 })
    expect(volume?.ok === true && units.volumeNumber(volume.geometryCm3)).toBe('15')
    expect(input?.cells).toEqual([{ cell: 0, quarters: 1 }])
  })

  it('leaves quarters aside as soon as there is more than one cell', () => {
    expect(read([0, 1], { quarters: 1 }).input?.cells).toEqual([{ cell: 0, quarters: 15 }, { cell: 1, quarters: 15 }])
  })

  it('asks for the volume of one load where loads are counted', () => {
    expect(read([0], { loads: '10' }).problems.loadVolume).toBe('Give the volume of one load')
  })
})

describe('what is sent', () => {
  it('is in kept units, with the instant of the site’s clock', () => {
    expect(read([0], { looseThickness: '10', passes: '8' }).input).toMatchObject({
      lift: 2,
      materialId: material.id,
      happenedAt: '2026-12-01T16:30:00.000Z',
      loads: 0,
      loadVolumeCm3: 0,
      looseThicknessUm: 254_000,
      machine: 'Roller 2',
      passes: 8,
    })
  })

  it('waits while a figure cannot be read', () => {
    const { problems, input } = read([0], { loads: '3.5', looseThickness: 'ten', passes: '-1', happenedAt: '' })
    expect(Object.keys(problems).sort()).toEqual(['happenedAt', 'looseThickness', 'loads', 'passes'].sort())
    expect(input).toBeNull()
  })
})

describe('covering too early', () => {
  it.each([
    ['a released surface', { lift: 1, state: 'released' }, 2, false],
    ['an accepted one', { lift: 1, state: 'accepted-as-is' }, 2, false],
    ['one that meets spec and is not released', { lift: 1, state: 'meets-spec' }, 2, true],
    ['a foundation not inspected', { lift: 0, state: 'awaiting-test' }, 1, true],
    ['a released one over a doubtful lift', { lift: 1, state: 'released', flags: ['doubt'] }, 2, true],
    ['a lift that skips one not placed', { lift: 1, state: 'released' }, 3, true],
  ] as const)('%s', (_words, standing, lift, early) => {
    expect(coversTooEarly(plan, buildSheet({ 0: standing }), 0, lift)).toBe(early)
  })

  it('names how many, how the ground beneath stands and what follows', () => {
    const surface = buildSheet({ 0: { lift: 1, state: 'awaiting-test' }, 1: { lift: 1, state: 'awaiting-test' }, 4: { lift: 0, state: 'awaiting-test' } })
    expect(coveredTitle([0, 1, 4])).toBe('3 of these cells sit on ground that is not released')
    expect(coveredTitle([0])).toBe('1 of these cells sits on ground that is not released')
    expect(coveredConsequence(plan, surface, [0, 1, 4])).toBe(
      'Lift 1 in A1:B1 still waits for a test. Foundation in A2 still waits for inspection. Placing now marks it covered too early, and everything above it stays in doubt until it is dealt with.',
    )
  })

  it('says of at most two kinds of ground and counts the rest', () => {
    const surface = buildSheet({ 0: { lift: 1, state: 'rework' }, 1: { lift: 1, state: 'suspect' }, 2: { lift: 1, state: 'meets-spec' } })
    expect(coveredConsequence(plan, surface, [0, 1, 2])).toMatch(/And 1 cell more\./)
  })
})
