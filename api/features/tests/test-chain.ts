import type { EntityManager } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { refusal } from '#api/http/refuse-input.ts'
import { squaredDistance } from '#shared/domain/failure-marks.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import type { Reason } from '#shared/domain/result.ts'
import { currentOf } from '#shared/domain/retest-chain.ts'
import type { GridPoint } from '#shared/domain/site-geometry.ts'
import type { CreateTest, Purpose } from '#shared/schemas/field-test.ts'

/** A re-run is taken at the place of the reading it doubts. */
const RERUN_WITHIN_MM = 1_000

export interface Chain {
  readonly id: string
  /** every test of it, void ones too, in the order they were sampled */
  readonly tests: readonly FieldTestEntity[]
  readonly followed: FieldTestEntity
  readonly current: FieldTestEntity | null
}

/** The tests of a chain as its current result is chosen: by time sampled, then by running number. */
export async function loadChainTests(manager: EntityManager, siteId: string, chainId: string): Promise<FieldTestEntity[]> {
  return manager.find(FieldTestEntity, { where: { siteId, chainId }, order: { sampledAt: 'ASC', seq: 'ASC' } })
}

/** Of these, the one that counts: the last that is not void. */
export function currentTest(tests: readonly FieldTestEntity[]): FieldTestEntity | null {
  return currentOf(tests.map((test) => ({ test, isVoid: test.voidedAt !== null })))?.test ?? null
}

/** The chain a test follows on, or null for a first test. */
export async function loadChain(manager: EntityManager, siteId: string, follows: CreateTest['follows']): Promise<Chain | null> {
  if (follows === null) return null
  const followed = await manager.findOneBy(FieldTestEntity, { siteId, id: follows.testId })
  if (!followed) throw refuse('The test to follow is not on this site. Choose it again.')
  const tests = await loadChainTests(manager, siteId, followed.chainId)
  return { id: followed.chainId, tests, followed, current: currentTest(tests) }
}

interface Following extends Pick<CreateTest, 'purpose' | 'lift' | 'follows'> {
  readonly zoneId: string
  readonly at: GridPoint
  readonly sampledAt: Date
  readonly reworkReported: boolean
}

/**
 * What a follower must be: at the lift of the test it follows, sampled after it, of the same side (or a referee's), and
 * a re-run only of a reading that is in doubt or void.
 * @returns flags of what is allowed but told
 */
export function checkFollowing({ followed, current }: Chain, test: Following): Reason[] {
  const { number } = followed
  if (followed.lift !== test.lift || followed.zoneId !== test.zoneId) {
    throw refuse(`${number} was taken in lift ${followed.lift}. A retest or re-run belongs to the same lift.`)
  }
  if (followed.sampledAt.getTime() > test.sampledAt.getTime()) {
    throw refuse(`${number} was sampled later than this. Check the time.`)
  }
  if (test.purpose !== 'referee' && sideOf(test.purpose) !== sideOf(followed.purpose)) {
    throw refuse(`${number} is a ${followed.purpose} test; only the same side's test or a referee's can follow it.`)
  }
  const flags: Reason[] = []
  if (test.follows?.kind === 'retest') {
    if (!test.reworkReported) flags.push({ code: 'retest-without-rework', message: `No rework was reported done after ${number}.` })
    return flags
  }
  const doubtful = followed.voidedAt !== null || isDoubtful(followed)
  if (followed.voidedAt === null && followed.id !== current?.id) {
    throw refuse(`${number} is no longer the result that counts. Re-run ${current?.number ?? 'the last one'}.`)
  }
  if (!doubtful) throw refuse(`${number} is not in doubt, so it is not run again. Record a retest after rework, or a new test.`)
  if (squaredDistance(followed, test.at) > RERUN_WITHIN_MM ** 2) {
    flags.push({ code: 'rerun-elsewhere', message: `The re-run is more than 1 m from ${number}.` })
  }
  return flags
}

/** A reading that cannot be right, that asks for a check, or that an apparatus limit speaks against. */
function isDoubtful({ outcome, verdict, sheet }: FieldTestEntity): boolean {
  const reduced = reduceSheet(sheet)
  return outcome === 'suspect' || verdict.advice.length > 0 || (reduced.ok && reduced.flags.length > 0)
}

function sideOf(purpose: Purpose): 'contractor' | 'owner' | 'referee' {
  return purpose === 'verification' ? 'owner' : purpose === 'referee' ? 'referee' : 'contractor'
}

function refuse(message: string): Error {
  return refusal([{ path: 'body.follows', message }])
}

/** True once rework of an order that a test of the chain caused was reported done before this moment. */
export async function wasReworkReported(manager: EntityManager, siteId: string, chainId: string, before: Date): Promise<boolean> {
  const rows: { n: string }[] = await manager.query(
    "SELECT COUNT(*) AS `n` FROM `rework_step` s JOIN `rework_order` o ON o.`site_id` = s.`site_id` AND o.`id` = s.`order_id` JOIN `field_test` t ON t.`site_id` = o.`site_id` AND t.`id` = o.`cause_test_id` WHERE s.`site_id` = ? AND s.`kind` = 'ready' AND s.`happened_at` < ? AND t.`chain_id` = ?",
    [siteId, before, chainId],
  )
  return Number(rows[0]?.n ?? 0) > 0
}
