import { describe, expect, it } from 'vitest'
import { edgeWords, remedyWords, standingWords, stepsToTake } from '#web/features/rework/order/order-words.ts'
import { readReadyForm, readyFormOf } from '#web/features/rework/order/ready-form.ts'
import { makeUnits } from '#web/lib/units.ts'
import { buildOrder } from '#tests/factories/order-view.ts'

const us = makeUnits('us', 'America/Los_Angeles')
const si = makeUnits('si', 'America/Los_Angeles')
const NOW = Date.parse('2026-12-01T22:32:07.000Z')

describe('what to do to the ground of an order', () => {
  it('names depth, water and passes of soil that is too dry, in the site’s units', () => {
    expect(stepsToTake(buildOrder(), us)).toEqual([
      { what: 'Scarify full depth', figure: '8\u2009in' },
      { what: 'Add water, mix until even', figure: '5,680\u2009gal' },
      { what: 'Re-roll, padfoot', figure: '6 passes' },
    ])
    expect(stepsToTake(buildOrder(), si).map((step) => step.figure)).toEqual(['203\u2009mm', '21,501\u2009L', '6 passes'])
  })

  it('dries soil that is too wet, and says how much water it has to lose', () => {
    const steps = stepsToTake(buildOrder({ actions: ['too-wet'], waterLitres: -1000 }), us)
    expect(steps[1]).toEqual({ what: 'Dry it back, mix until even', figure: 'lose 264\u2009gal' })
  })

  it('only rolls soil that is too loose, and rolls lighter where it is too dense', () => {
    expect(stepsToTake(buildOrder({ actions: ['too-loose'], waterLitres: null, passesWanted: 1 }), us)).toEqual([{ what: 'Re-roll, padfoot', figure: '1 pass' }])
    expect(stepsToTake(buildOrder({ actions: ['too-dense'], waterLitres: null, machine: '', passesWanted: null }), us)).toEqual([
      { what: 'Scarify full depth', figure: '8\u2009in' },
      { what: 'Roll lighter', figure: null },
    ])
  })

  it('gives no figures where the order names nothing to do', () => {
    expect(stepsToTake(buildOrder({ actions: ['other'], waterLitres: null }), us)).toEqual([])
    expect(remedyWords(buildOrder({ actions: ['other'], waterLitres: null }), us)).toBe('as the lead says')
  })
})

describe('the words of an order', () => {
  it('warn of each open side once, and defer to the site safety plan', () => {
    expect(edgeWords(buildOrder())).toBe('Stay back from the open edge on the east side, as the site safety plan says.')
    const edges = (['east', 'south', 'west'] as const).map((side) => ({ side, cells: [0], dropUm: 400_000 }))
    expect(edgeWords({ edges })).toBe('Stay back from the open edges on the east, south and west sides, as the site safety plan says.')
    expect(edgeWords({ edges: [] })).toBeNull()
  })

  it('say since when it stands as it does, with the date where that is another day', () => {
    expect(standingWords(buildOrder(), us, NOW)).toBe('Issued 12:00, not started')
    expect(standingWords(buildOrder({ state: 'working', workingSince: '2026-12-01T21:12:00.000Z' }), us, NOW)).toBe('Working since 13:12')
    expect(standingWords(buildOrder({ state: 'closed', closedAt: '2026-11-28T21:12:00.000Z' }), us, NOW)).toBe('Closed Nov 28, 13:12')
  })
})

describe('the report of rework done', () => {
  it('begins with what the order wants and sends SI', () => {
    const form = readyFormOf(buildOrder(), us)
    expect(form).toEqual({ passes: '6', water: '5680', depth: '8', remarks: '' })
    const read = readReadyForm(form, us)
    expect(read.ok && read.done.passes).toBe(6)
    expect(read.ok && read.done.depthUm).toBe(203_200)
    expect(read.ok && read.done.waterLitres).toBeCloseTo(21_501.1, 0)
  })

  it('says beside each field what cannot be so, and keeps what was typed', () => {
    expect(readReadyForm({ passes: '', water: 'much', depth: '-1', remarks: '' }, us)).toEqual({
      ok: false,
      errors: { passes: 'Give the number of passes', water: 'Write it as a plain number, such as 12.5', depth: 'A depth from 0 to 118.1\u2009in' },
    })
    const half = readReadyForm({ passes: '5.5', water: '0', depth: '8', remarks: '' }, us)
    expect(half).toEqual({ ok: false, errors: { passes: 'Passes are a whole number from 0 to 200' } })
  })
})
