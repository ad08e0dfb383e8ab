import { describe, expect, it } from 'vitest'
import { stateOf, type CellFacts } from '#shared/domain/cell-state.ts'
import { GROUND_FLAGS } from '#shared/domain/ground-state.ts'

const everything: CellFacts = {
  placed: true,
  partial: false,
  acceptedAsIs: true,
  rework: { testId: 'fail' },
  retest: { testId: 'old-fail' },
  recheck: true,
  release: 'released',
  suspect: { testId: 'suspect' },
  hold: null,
  spokenFor: false,
  leadingPassId: 'pass',
  pendingId: 'pending',
  near: false,
}
const awaiting: CellFacts = { ...everything, acceptedAsIs: false, rework: null, retest: null, recheck: false, release: null, suspect: null }

describe('the state of a cell at a lift', () => {
  it('is the first that applies, in the order of domain section 6', () => {
    let facts: CellFacts = { ...everything, placed: false }
    const steps: [Partial<CellFacts>, string, string | null][] = [
      [{}, 'not-placed', null],
      [{ placed: true }, 'accepted-as-is', 'pass'],
      [{ acceptedAsIs: false }, 'rework', 'fail'],
      [{ rework: null }, 'awaiting-retest', 'old-fail'],
      [{ retest: null }, 'recheck', 'pass'],
      [{ recheck: false }, 'released', 'pass'],
      [{ release: null }, 'suspect', 'suspect'],
      [{ suspect: null }, 'awaiting-test', 'pending'],
      [{ spokenFor: true }, 'meets-spec', 'pass'],
    ]
    for (const [change, state, namingTestId] of steps) {
      facts = { ...facts, ...change }
      expect(stateOf(facts)).toMatchObject({ state, namingTestId })
    }
  })

  it('shows near only on ground that meets spec or is released', () => {
    const flagsOf = (facts: Partial<CellFacts>) => stateOf({ ...awaiting, near: true, ...facts }).flags
    expect(flagsOf({})).toBe(0)
    expect(flagsOf({ spokenFor: true })).toBe(GROUND_FLAGS.near)
    expect(flagsOf({ release: 'released' })).toBe(GROUND_FLAGS.near)
    expect(flagsOf({ recheck: true })).toBe(0)
  })

  it('flags a verification hold on released and accepted ground, and fails ground that is neither', () => {
    const hold = { testId: 'v1' }
    expect(stateOf({ ...awaiting, release: 'released', hold })).toEqual({ state: 'released', flags: GROUND_FLAGS.hold, namingTestId: 'pass' })
    expect(stateOf({ ...awaiting, acceptedAsIs: true, hold })).toMatchObject({ state: 'accepted-as-is', flags: GROUND_FLAGS.hold })
    expect(stateOf({ ...awaiting, spokenFor: true, hold })).toEqual({ state: 'rework', flags: GROUND_FLAGS.hold, namingTestId: 'v1' })
  })

  it('leaves ground whose release waits for the owner as it is, flagged', () => {
    expect(stateOf({ ...awaiting, spokenFor: true, release: 'awaiting-acceptance' })).toMatchObject({ state: 'meets-spec', flags: GROUND_FLAGS.awaitingAcceptance })
    expect(stateOf({ ...awaiting, rework: { testId: 'fail' }, release: 'awaiting-acceptance' })).toMatchObject({ state: 'rework', flags: 0 })
  })

  it('flags a partly placed cell whatever its state', () => {
    expect(stateOf({ ...awaiting, partial: true }).flags).toBe(GROUND_FLAGS.partial)
    expect(stateOf({ ...awaiting, placed: false, partial: true }).flags).toBe(0)
  })
})
