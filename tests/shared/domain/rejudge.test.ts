import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { changeOf, judgeAgain, rejudgeEffect, weightOf } from '#shared/domain/rejudge.ts'
import { judge } from '#shared/domain/verdict.ts'
import type { JudgedAgainst } from '#shared/domain/verdict.ts'

const PASS = { outcome: 'pass', treatedAsFail: false } as const
const FAIL = { outcome: 'fail', treatedAsFail: false } as const
const SUSPECT = { outcome: 'suspect', treatedAsFail: false } as const
const BELOW = { outcome: 'suspect', treatedAsFail: true } as const
const FREE = { inForce: true, order: null } as const
const UNTOUCHED = { inForce: true, order: { workBegun: false, otherFailure: false } } as const

// The cases are those of the rule in rejudgeEffect, which follows domain sections 3, 6 and 7.
describe('rejudgeEffect', () => {
  it.each([
    ['a new failure marks and issues', PASS, FAIL, FREE, 'make', 'issue'],
    ['a new suspicion below the limit as well', PASS, BELOW, FREE, 'make', 'issue'],
    ['a new suspicion marks without an order', PASS, SUSPECT, FREE, 'make', 'none'],
    ['a failure that a later result replaced marks nothing', PASS, FAIL, { ...FREE, inForce: false }, 'lift', 'none'],
    ['a failure lifted before anybody began is withdrawn', FAIL, PASS, UNTOUCHED, 'lift', 'withdraw'],
    ['a failure lifted after work began stands', FAIL, PASS, { ...UNTOUCHED, order: { workBegun: true, otherFailure: false } }, 'lift', 'stands'],
    ['another failure of the chain takes the order back, begun or not', FAIL, PASS, { ...UNTOUCHED, order: { workBegun: true, otherFailure: true } }, 'lift', 'hand-back'],
    ['a failure that becomes a suspicion marks as one', FAIL, SUSPECT, UNTOUCHED, 'make', 'withdraw'],
    ['a failure without an order only loses its marks', FAIL, PASS, FREE, 'lift', 'none'],
    ['a suspicion lifted loses its marks', SUSPECT, PASS, FREE, 'lift', 'none'],
    ['a suspicion that becomes a failure marks anew', SUSPECT, FAIL, FREE, 'make', 'issue'],
    ['a failure that stays one keeps its marks, its order says the new reasons', FAIL, FAIL, UNTOUCHED, 'keep', 'reword'],
    ['a suspicion below the limit and a failure weigh the same', BELOW, FAIL, UNTOUCHED, 'keep', 'reword'],
    ['a pass that stays one does nothing', PASS, PASS, FREE, 'keep', 'none'],
  ] as const)('%s', (_, before, after, standing, marks, order) => {
    expect(rejudgeEffect(before, after, standing)).toEqual({ marks, order })
  })

  it('never marks ground of a result out of force, and never withdraws an order that was begun', () => {
    const judged = fc.constantFrom(PASS, FAIL, SUSPECT, BELOW)
    const standing = fc.record({ inForce: fc.boolean(), order: fc.option(fc.record({ workBegun: fc.boolean(), otherFailure: fc.boolean() })) })
    fc.assert(
      fc.property(judged, judged, standing, (before, after, where) => {
        const effect = rejudgeEffect(before, after, where)
        if (!where.inForce) expect(effect.marks).not.toBe('make')
        if (where.order?.workBegun) expect(effect.order).not.toBe('withdraw')
        if (weightOf(before) === weightOf(after)) expect(effect.marks).toBe('keep')
      }),
    )
  })
})

const AGAINST: JudgedAgainst = {
  curve: { maxDryDensity: 1922, optimumMoisture: 12, gs: 2.7, gsMeasured: true },
  criteria: [{ kind: 'rc-min', text: '95' }, { kind: 'moisture-band', lowText: '-2', highText: '+2' }],
  rounding: { method: 'absolute' },
  repeatability: { rc: 0.5, moisture: 0.3 },
  waterDensity: 1000,
}

describe('judgeAgain', () => {
  it('changes the reference and nothing else, and by the same curve nothing at all', () => {
    fc.assert(
      fc.property(fc.double({ min: 1700, max: 1950, noNaN: true }), fc.double({ min: 8, max: 14, noNaN: true }), fc.double({ min: 1800, max: 2000, noNaN: true }), (dryDensity, moisture, maximum) => {
        const first = judge({ dryDensity, moisture }, AGAINST)
        if (!first.ok) throw new Error('The reading is an ordinary one')
        expect(judgeAgain(first.verdict, AGAINST.curve)).toEqual(first)
        const curve = { ...AGAINST.curve, maxDryDensity: maximum }
        const again = judgeAgain(first.verdict, curve)
        expect(again).toEqual(judge({ dryDensity, moisture }, { ...AGAINST, curve }))
        // domain section 3: RC = 100·γd / γd,max
        if (again.ok) expect(again.verdict.rc).toBeCloseTo((100 * dryDensity) / maximum, 9)
      }),
    )
  })

  it('does not judge oversize by a curve that does not know its stones', () => {
    const coarse = { bulkGravity: 2.65, moisture: 1, sieve: 'no-4' } as const
    const first = judge({ dryDensity: 1880, moisture: 11, oversizeShare: 12 }, { ...AGAINST, curve: { ...AGAINST.curve, coarse } })
    if (!first.ok) throw new Error('The stones are known')
    expect(judgeAgain(first.verdict, AGAINST.curve).ok).toBe(false)
  })
})

describe('changeOf', () => {
  const verdict = (dryDensity: number, moisture = 12) => {
    const judged = judge({ dryDensity, moisture }, AGAINST)
    if (!judged.ok) throw new Error('The reading is an ordinary one')
    return judged.verdict
  }
  it.each([
    ['to-fail', 1880, 12, 1780, 12],
    ['to-pass', 1780, 12, 1880, 12],
    ['to-suspect', 1880, 12, 1880, 17],
    ['reasons', 1780, 12, 1780, 9],
    ['near', 1880, 12, 1830, 12],
    ['figures', 1880, 12, 1885, 12],
  ] as const)('says %s', (change, density, moisture, otherDensity, otherMoisture) => {
    expect(changeOf(verdict(density, moisture), verdict(otherDensity, otherMoisture))).toBe(change)
  })
})
