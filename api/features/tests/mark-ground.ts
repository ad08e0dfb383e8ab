import type { DerivedLot } from '#api/features/ground/change-ground.ts'
import { mayBeCovered } from '#shared/domain/ground-state.ts'
import { markFailure } from '#shared/domain/failure-marks.ts'
import type { LotMark } from '#shared/domain/lot-facts.ts'
import type { GridPoint } from '#shared/domain/site-geometry.ts'
import type { Verdict } from '#shared/domain/verdict-types.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'

export interface GroundMark {
  readonly kind: LotMark['kind']
  readonly cells: readonly number[]
}

interface MarkInput {
  readonly verdict: Pick<Verdict, 'outcome' | 'treatedAsFail'>
  readonly purpose: Purpose
  readonly cell: number
  readonly at: GridPoint
  /** the result this test takes the place of: it is no pass any more */
  readonly replacesId: string | null
  /** the lot of the cell, undefined where nothing is placed yet */
  readonly lot: DerivedLot | undefined
}

/** True for a result that counts as a failure: a fail, or a suspicion below the density limit. */
export function isFailure({ outcome, treatedAsFail }: Pick<Verdict, 'outcome' | 'treatedAsFail'>): boolean {
  return outcome === 'fail' || treatedAsFail
}

/**
 * What a result marks when it is saved (domain section 6): a failure its ground, or, where the owner's or a referee's test
 * meets released ground, a hold on that part; a suspicion the same ground as suspect; a pass nothing.
 */
export function marksOf({ verdict, purpose, cell, at, replacesId, lot }: MarkInput): GroundMark[] {
  const failure = isFailure(verdict)
  if (!failure && verdict.outcome !== 'suspect') return []
  const cells = lot ? cellsMarked(lot, cell, at, replacesId) : [cell]
  if (!failure) return [{ kind: 'suspect', cells }]
  const owners = purpose === 'verification' || purpose === 'referee'
  const covered = new Set(owners && lot ? lot.derived.cells.filter((other) => mayBeCovered(other.state)).map((other) => other.cell) : [])
  const marks: GroundMark[] = [
    { kind: 'fail', cells: cells.filter((marked) => !covered.has(marked)) },
    { kind: 'hold', cells: cells.filter((marked) => covered.has(marked)) },
  ]
  return marks.filter((mark) => mark.cells.length > 0)
}

function cellsMarked({ facts, derived }: DerivedLot, cell: number, at: GridPoint, replacesId: string | null): number[] {
  const volumes = new Map(derived.cells.map((other) => [other.cell, other.volumeCm3]))
  const passes = facts.tests.filter((test) => test.outcome === 'pass' && !test.superseded && test.testId !== replacesId)
  return markFailure({
    failAt: at,
    failCell: cell,
    passes: passes.map((test) => test.at),
    lotCells: facts.cells.map((other) => ({ cell: other.cell, column: other.column, row: other.row, centroid: other.centroid, volumeCm3: volumes.get(other.cell) ?? 0 })),
    fCm3: derived.fCm3,
  })
}

/** Cells a failure puts into rework. */
export function failedCells(marks: readonly GroundMark[]): readonly number[] {
  return marks.find((mark) => mark.kind === 'fail')?.cells ?? []
}
