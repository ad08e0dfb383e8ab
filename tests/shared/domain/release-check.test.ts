import { describe, expect, it } from 'vitest'
import { GROUND_FLAGS } from '#shared/domain/ground-state.ts'
import { checkRelease, type ReleaseCell } from '#shared/domain/release-check.ts'

const pass = { sampledAt: 50, cell: 9, curveApproved: true, superseded: false, gauge: null }
const good = (cell: number, change: Partial<ReleaseCell> = {}): ReleaseCell => ({
  cell,
  state: 'meets-spec',
  flags: 0,
  far: false,
  thicknessOff: false,
  coveredAt: null,
  passes: [pass],
  ...change,
})
const settled = { owed: 0, unreleased: [1, 2, 3], gaugeChecksOwed: 0 }
const check = (cells: readonly ReleaseCell[], lot: Partial<typeof settled> = {}, lift = 2) => checkRelease({ lift, cells, lot: { ...settled, ...lot } })
const redOf = (change: Partial<ReleaseCell>, lift = 2) => check([good(1), good(2, change)], {}, lift).red.map(({ code, cells }) => [code, ...cells])

describe('the checklist of a release', () => {
  it('is free of red for ground that meets spec', () => {
    expect(check([good(1), good(2)])).toEqual({ red: [], amber: [], verdict: 'free' })
  })

  it('blocks failed, suspect, unplaced, partly placed, rechecked and already released ground', () => {
    expect(redOf({ state: 'rework' })).toEqual([['failed', 2]])
    expect(redOf({ state: 'awaiting-retest' })).toEqual([['awaiting-retest', 2]])
    expect(redOf({ state: 'suspect' })).toEqual([['suspect', 2]])
    expect(redOf({ state: 'not-placed', passes: [] })).toEqual([['not-placed', 2]])
    expect(redOf({ flags: GROUND_FLAGS.partial })).toEqual([['partly-placed', 2]])
    expect(redOf({ state: 'recheck' })).toEqual([['recheck', 2]])
    expect(redOf({ state: 'accepted-as-is' })).toEqual([['already-released', 2]])
    expect(check([good(1, { state: 'rework' })]).verdict).toBe('blocked')
  })

  it('blocks a superseded test and an unapproved curve', () => {
    expect(redOf({ passes: [pass, { ...pass, superseded: true }] })).toEqual([['superseded-test', 2]])
    expect(redOf({ passes: [{ ...pass, curveApproved: false }] })).toEqual([['curve-not-approved', 2]])
  })

  it('blocks tests whose gauge was not checked, names them once, and lets no reason override it', () => {
    const unchecked = (test: string) => ({ ...pass, gauge: { kind: 'not-checked' as const, test, message: 'Gauge 4127 has no standard count on Mar 5.' } })
    const blocked = check([good(1, { passes: [unchecked('T-0002'), unchecked('T-0001')] }), good(2, { passes: [unchecked('T-0002')] }), good(3)])
    expect(blocked.red).toEqual([
      { code: 'gauge-not-checked', message: 'T-0001, T-0002 rest on a gauge that was not checked. Gauge 4127 has no standard count on Mar 5. Record that day’s count, or test again.', cells: [1, 2] },
    ])
    expect(blocked.verdict).toBe('blocked')
  })

  it('only notes a gauge test that names no gauge', () => {
    const unnamed = { ...pass, gauge: { kind: 'not-named' as const, test: 'T-0001', message: '' } }
    expect(check([good(1, { passes: [unnamed] })])).toEqual({ red: [], amber: [{ code: 'gauge-not-named', message: 'T-0001 names no gauge of the register.', cells: [1] }], verdict: 'free' })
  })

  it('lets a reason override ground no test speaks for, and thickness', () => {
    expect(redOf({ state: 'awaiting-test' })).toEqual([['frequency-short', 2]])
    expect(redOf({ thicknessOff: true })).toEqual([['thickness', 2]])
    expect(check([good(1, { state: 'awaiting-test', thicknessOff: true })]).verdict).toBe('with-reason')
    expect(check([good(1, { state: 'awaiting-test' }), good(2, { state: 'suspect' })]).verdict).toBe('blocked')
  })

  it('does not let the last cells of a lot go while it owes tests, without a reason', () => {
    expect(check([good(1), good(2)], { owed: 1 }).verdict).toBe('free')
    const last = check([good(1), good(2), good(3)], { owed: 1 })
    expect(last.red.map(({ code, cells }) => [code, cells])).toEqual([['tests-owed', [1, 2, 3]]])
    expect(last.verdict).toBe('with-reason')
  })

  it('wants the foundation inspected, and takes no reason instead', () => {
    expect(redOf({ state: 'awaiting-test', passes: [] }, 0)).toEqual([['not-inspected', 2]])
    expect(check([good(1, { state: 'awaiting-test', passes: [] })], {}, 0).verdict).toBe('blocked')
  })

  it('clears a covered layer only by a pass sampled before the cover or taken down in it', () => {
    expect(redOf({ coveredAt: 60 })).toEqual([])
    expect(redOf({ coveredAt: 40 })).toEqual([['passed-after-cover', 2]])
    expect(redOf({ coveredAt: 40, passes: [{ ...pass, cell: 2 }] })).toEqual([])
  })

  it('shows near limits, reach, gauge checks and doubt in amber, blocking nothing', () => {
    const { amber, verdict } = check([good(1, { flags: GROUND_FLAGS.near | GROUND_FLAGS.doubt, far: true })], { gaugeChecksOwed: 1 })
    expect(amber.map((finding) => finding.code)).toEqual(['near-limit', 'far-reach', 'gauge-checks', 'below-unresolved'])
    expect(verdict).toBe('free')
  })
})
