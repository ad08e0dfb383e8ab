import type { BlockReason } from './column-types.ts'
import type { GroundState } from './ground-state.ts'

const BLOCKS: Readonly<Record<BlockReason, string>> = {
  complete: 'At design grade',
  'not-placed': 'A lift below is not placed',
  partial: 'Only part of the cell is placed',
  rework: 'In rework',
  'awaiting-retest': 'Waiting for a retest',
  recheck: 'To be looked at again',
  suspect: 'Result can’t be right, run it again',
  'awaiting-test': 'Waiting for a test',
  'awaiting-inspection': 'Foundation waits for inspection',
  'not-released': 'Tests met, waiting for release',
  'awaiting-acceptance': 'Waiting for the owner’s acceptance',
  hold: 'On hold: a verification test fails',
}

/** Why a cell cannot take its next lift, in words, with the lift that stands in the way. */
export function blockWords(reason: BlockReason, lift: number): string {
  return reason === 'complete' ? BLOCKS.complete : `${BLOCKS[reason]} (${lift === 0 ? 'foundation' : `lift ${lift}`})`
}

export interface WhyFacts {
  readonly lift: number
  readonly state: GroundState
  readonly covered: boolean
  readonly partial: boolean
  readonly awaitingAcceptance: boolean
  /** tests the lot owes, of those required */
  readonly owed: number
  readonly required: number
  /** the test that names the state */
  readonly test: string | null
  readonly order: string | null
}

/** Why a (cell, lift) stands where it does, in one short line. */
export function whyWords(facts: WhyFacts): string {
  const parts = [reasonOf(facts)]
  if (facts.partial) parts.push('partly placed')
  if (facts.covered) parts.push('covered too early')
  return parts.filter((part) => part !== '').join('; ')
}

function reasonOf({ lift, state, owed, required, test, order, awaitingAcceptance }: WhyFacts): string {
  switch (state) {
    case 'none':
    case 'not-placed':
      return ''
    case 'awaiting-test':
      if (lift === 0) return 'awaiting inspection'
      return owed > 0 ? `lot owes ${owed} of ${required}` : 'no passing test speaks for all of it'
    case 'awaiting-retest':
      return order ? `${order}, rework reported done` : 'rework reported done'
    case 'rework':
      return [order, test].filter((name) => name !== null).join(', ')
    case 'suspect':
      return test ? `${test}, run it again` : 'run it again'
    case 'meets-spec':
      return awaitingAcceptance ? 'waits for the owner’s acceptance' : 'not released yet'
    case 'released':
    case 'recheck':
    case 'accepted-as-is':
      return test ?? ''
  }
}
