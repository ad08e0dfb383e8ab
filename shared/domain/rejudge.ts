import type { CoarsePart, Judgement, Outcome, ReferencePair, Verdict } from '#shared/domain/verdict-types.ts'
import { judge } from '#shared/domain/verdict.ts'

type Judged = Pick<Verdict, 'outcome' | 'treatedAsFail'>

/** What a verdict does to the ground: nothing, marks it for rework, or as suspect. */
export type VerdictWeight = 'pass' | 'fail' | 'suspect'

/** A suspicion below the density limit weighs as a failure (domain section 3). */
export function weightOf({ outcome, treatedAsFail }: Judged): VerdictWeight {
  return treatedAsFail ? 'fail' : (outcome satisfies Outcome)
}

/** Where the test stands when it is judged again. */
export interface RejudgedStanding {
  /** its chain's current result, not put out of force by rework reported in its cell */
  readonly inForce: boolean
  /** the open rework order it is the cause of, or null */
  readonly order: {
    /** the order was ever started or reported done */
    readonly workBegun: boolean
    /** another failure of the chain, not void, stands behind the order as well */
    readonly otherFailure: boolean
  } | null
}

export interface RejudgeEffect {
  /** the stored marks stay, fall, or are drawn anew as a new result's are */
  readonly marks: 'keep' | 'lift' | 'make'
  /**
   * `issue`: an order is issued, or the chain's open one joined; `withdraw`: taken back; `hand-back`: returns to the other
   * failure; `stands`: stays open, work on it had begun; `reword`: stays, with the new reasons
   */
  readonly order: 'none' | 'issue' | 'withdraw' | 'hand-back' | 'stands' | 'reword'
}

/**
 * What judging a test again does to its marks and its rework order (domain sections 3, 6 and 7). Marks are stored with the
 * verdict, and only a closed or edited order removes them: judging again with a reason is such an edit, by the person
 * whose orders and holds they are.
 *
 * - A verdict that weighs as before keeps its marks: later tests never shrink them, a new curve does not either. An open
 *   order takes the new reasons.
 * - To a failure: while the result is in force it marks and issues or joins its order as a new failure does. A result that
 *   a later one of its chain, or reported rework, put out of force marks nothing: the ground has its answer.
 * - From a failure: its marks fall. Its order goes back to another failure of the chain where one stands; else it is
 *   withdrawn, but only while nobody has begun: ground that was opened, wetted or dried is no longer the ground that was
 *   tested, so an order started or reported stands until its retests pass or the lead withdraws it with a reason.
 * - To or from a suspicion: marks are made or fall in the same way; there is no order.
 *
 * Releases and orders that other results closed follow from the changed facts; they are not decided here.
 */
export function rejudgeEffect(before: Judged, after: Judged, { inForce, order }: RejudgedStanding): RejudgeEffect {
  const [was, is] = [weightOf(before), weightOf(after)]
  if (was === is) return { marks: 'keep', order: is === 'fail' && order !== null ? 'reword' : 'none' }
  const marks = is !== 'pass' && inForce ? 'make' : 'lift'
  if (is === 'fail') return { marks, order: inForce ? 'issue' : 'none' }
  if (was !== 'fail' || order === null) return { marks, order: 'none' }
  if (order.otherFailure) return { marks, order: 'hand-back' }
  return { marks, order: order.workBegun ? 'stands' : 'withdraw' }
}

/**
 * Judges a test again by another curve: its own frozen readings, limits, rounding and water, only the reference changes.
 * @param verdict the verdict in force
 * @param curve the new reference, kg/m³ and percent
 * @returns the new verdict, or what keeps it from being computed (oversize without known stones)
 */
export function judgeAgain(verdict: Verdict, curve: Omit<ReferencePair, 'coarse'> & { readonly coarse?: CoarsePart | undefined }): Judgement {
  return judge(verdict.test, { ...verdict.against, curve })
}

/** How a verdict differs from the one before it; the first that applies, gravest first. */
export type VerdictChange = 'to-fail' | 'to-suspect' | 'to-pass' | 'reasons' | 'near' | 'figures'

export const VERDICT_CHANGES: readonly VerdictChange[] = ['to-fail', 'to-suspect', 'to-pass', 'reasons', 'near', 'figures']

type Compared = Judged & Pick<Verdict, 'near'> & { readonly reasons: readonly { readonly code: string }[] }

/** Names what changes between two verdicts of one test; `figures`: only RC and deviation move. */
export function changeOf(before: Compared, after: Compared): VerdictChange {
  const [was, is] = [weightOf(before), weightOf(after)]
  if (was !== is) return `to-${is}`
  const codes = (verdict: Compared) => verdict.reasons.map((reason) => reason.code).sort().join(' ')
  if (before.outcome !== after.outcome || codes(before) !== codes(after)) return 'reasons'
  return before.near !== after.near ? 'near' : 'figures'
}
