import { describe, expect, it } from 'vitest'
import { deriveColumn } from '#shared/domain/column.ts'
import type { ColumnRow } from '#shared/domain/column-types.ts'
import { GROUND_FLAGS, type GroundState } from '#shared/domain/ground-state.ts'

const layers = [1, 2, 3].map((lift) => ({ lift, bottomUm: (lift - 1) * 200_000, topUm: lift * 200_000 }))
/** Rows from lift 0 up. */
const rows = (...states: (GroundState | [GroundState, number])[]): ColumnRow[] =>
  states.map((state, lift) => (typeof state === 'string' ? { lift, state, flags: 0 } : { lift, state: state[0], flags: state[1] }))
const derive = (...states: Parameters<typeof rows>) => deriveColumn({ layers, rows: rows(...states) })
const { covered, doubt, hold, partial, awaitingAcceptance, near } = GROUND_FLAGS

describe('ready for the next lift', () => {
  it('waits for the foundation to be inspected, and begins with lift 1', () => {
    expect(deriveColumn({ layers, rows: [] })).toMatchObject({
      surfaceLift: 0,
      surfaceState: 'awaiting-test',
      ready: false,
      nextLift: 1,
      blockedBy: { lift: 0, reason: 'awaiting-inspection' },
    })
    expect(derive('released')).toMatchObject({ surfaceLift: 0, ready: true, nextLift: 1, blockedBy: null })
  })

  it('is given when every layer down to lift 0 is released or accepted as is', () => {
    expect(derive('accepted-as-is', 'released', 'accepted-as-is')).toMatchObject({ surfaceLift: 2, ready: true, nextLift: 3 })
  })

  it.each([
    ['meets-spec', 'not-released'],
    ['awaiting-test', 'awaiting-test'],
    ['awaiting-retest', 'awaiting-retest'],
    ['rework', 'rework'],
    ['suspect', 'suspect'],
    ['recheck', 'recheck'],
  ] as const)('is not given over %s', (state, reason) => {
    expect(derive('released', state)).toMatchObject({ ready: false, blockedBy: { lift: 1, state, reason } })
  })

  it('is not given over a partly placed cell, a hold, or a release the owner has not accepted', () => {
    expect(derive('released', ['released', partial]).blockedBy).toMatchObject({ reason: 'partial' })
    expect(derive('released', ['released', hold]).blockedBy).toMatchObject({ reason: 'hold' })
    expect(derive('released', ['meets-spec', awaitingAcceptance]).blockedBy).toMatchObject({ reason: 'awaiting-acceptance' })
  })

  it('names the lowest unresolved layer, not the top one', () => {
    expect(derive('released', 'suspect', 'rework').blockedBy).toEqual({ lift: 1, state: 'suspect', reason: 'suspect' })
  })

  it('names a planned layer that was left out', () => {
    const skipped: ColumnRow[] = [{ lift: 0, state: 'released', flags: 0 }, { lift: 2, state: 'released', flags: 0 }]
    expect(deriveColumn({ layers, rows: skipped }).blockedBy).toEqual({ lift: 1, state: 'not-placed', reason: 'not-placed' })
  })

  it('ends at the design top', () => {
    expect(derive('released', 'released', 'released', 'released')).toMatchObject({ ready: false, nextLift: null, blockedBy: { lift: 3, reason: 'complete' } })
    expect(derive('released', 'released', 'released', 'meets-spec').blockedBy).toMatchObject({ lift: 3, reason: 'not-released' })
    expect(deriveColumn({ layers: [], rows: rows('released') }).blockedBy).toMatchObject({ lift: 0, reason: 'complete' })
  })

  it('stands on what is placed when an upper lift was dug out again', () => {
    expect(derive('released', 'released', 'not-placed')).toMatchObject({ surfaceLift: 1, ready: true, nextLift: 2 })
  })
})

describe('covered too early', () => {
  it('lies on each unreleased lift under a placed one, and doubt on every lift above', () => {
    const { rows: flagged, surfaceFlags } = derive('released', 'awaiting-test', ['released', near], 'meets-spec')
    expect(flagged.map((row) => row.flags)).toEqual([0, covered, near | doubt, doubt])
    expect(surfaceFlags).toBe(doubt)
  })

  it('adds up where a doubted lift is itself covered unreleased', () => {
    expect(derive('awaiting-test', 'meets-spec', 'released').rows.map((row) => row.flags)).toEqual([covered, covered | doubt, doubt])
  })

  it('is gone once the layer is released, whatever the flags were before', () => {
    const before = derive('released', 'meets-spec', 'released').rows
    expect(before.map((row) => row.flags)).toEqual([0, covered, doubt])
    const after = deriveColumn({ layers, rows: before.map((row) => ({ ...row, state: 'released' as const })) })
    expect(after.rows.map((row) => row.flags)).toEqual([0, 0, 0])
    expect(after.ready).toBe(true)
  })
})
