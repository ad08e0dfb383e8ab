import { hasFlag, mayBeCovered, type GroundState } from './ground-state.ts'

/** A passing test that speaks for a cell. */
export interface ReleasePass {
  readonly sampledAt: number
  readonly cell: number
  readonly curveApproved: boolean
  readonly superseded: boolean
  /** what is wrong with the gauge it was read with; null where nothing is, or it was read without one */
  readonly gauge: GaugeTrouble | null
}

export interface GaugeTrouble {
  /** `not-checked`: not good at that time; `not-named`: it names no gauge, as tests did before there was a register */
  readonly kind: 'not-checked' | 'not-named'
  /** number of the test */
  readonly test: string
  readonly message: string
}

/** One cell the lead wants to release, as its lot and column derived it. */
export interface ReleaseCell {
  readonly cell: number
  readonly state: GroundState
  /** GROUND_FLAGS bits, covered and doubt included */
  readonly flags: number
  /** a share of it reaches farther than one test reasonably does */
  readonly far: boolean
  /** surveyed thickness beyond what the specification allows, or short of it */
  readonly thicknessOff: boolean
  /** when a higher lift first covered it; null while it is open */
  readonly coveredAt: number | null
  /** the passes that speak for it */
  readonly passes: readonly ReleasePass[]
}

export interface ReleaseRequest {
  readonly lift: number
  readonly cells: readonly ReleaseCell[]
  readonly lot: {
    /** tests the lot still owes */
    readonly owed: number
    /** placed cells of the lot neither released nor accepted as is, those of the request included */
    readonly unreleased: readonly number[]
    /** sand cones or ovens still owed for the lot's gauge tests */
    readonly gaugeChecksOwed: number
  }
}

export const RELEASE_CODES = [
  'not-placed',
  'already-released',
  'partly-placed',
  'failed',
  'awaiting-retest',
  'suspect',
  'recheck',
  'not-inspected',
  'superseded-test',
  'curve-not-approved',
  'passed-after-cover',
  'gauge-not-checked',
  'frequency-short',
  'tests-owed',
  'thickness',
  'near-limit',
  'far-reach',
  'gauge-checks',
  'gauge-not-named',
  'below-unresolved',
] as const

export type ReleaseCode = (typeof RELEASE_CODES)[number]

export interface ReleaseFinding {
  readonly code: ReleaseCode
  readonly message: string
  /** cells concerned, in the order of the request */
  readonly cells: readonly number[]
}

export interface ReleaseCheck {
  /** each blocks the release */
  readonly red: readonly ReleaseFinding[]
  /** shown, blocks nothing */
  readonly amber: readonly ReleaseFinding[]
  /** `free`: no red; `with-reason`: every red may be overridden by a reason that goes to the owner */
  readonly verdict: 'free' | 'with-reason' | 'blocked'
}

const OVERRIDABLE: readonly ReleaseCode[] = ['frequency-short', 'tests-owed', 'thickness']

/**
 * The checklist of a release (domain section 7). Red: ground not placed or partly placed, already released, failed or
 * awaiting a retest, suspect, to be rechecked, a foundation not inspected, a superseded test or an unapproved curve
 * under it, a pass that came only after it was covered and lies elsewhere, or one read with a gauge that had
 * no good standard count that day, was out of service or past its calibration. Frequency short (no pass speaks for
 * it, or these are the last unreleased cells of a lot that owes tests) and thickness may be overridden with a reason.
 */
export function checkRelease({ lift, cells, lot }: ReleaseRequest): ReleaseCheck {
  const requested = new Set(cells.map((cell) => cell.cell))
  const last = lot.owed > 0 && lot.unreleased.every((cell) => requested.has(cell))
  const where = (test: (cell: ReleaseCell) => boolean) => cells.filter(test).map((cell) => cell.cell)
  const inState = (...states: GroundState[]) => where((cell) => states.includes(cell.state))
  const flagged = (flag: 'partial' | 'near' | 'doubt') => where((cell) => hasFlag(cell.flags, flag))
  const red = found([
    ['not-placed', 'No fill is placed here at this lift.', inState('none', 'not-placed')],
    ['already-released', 'Already released or accepted as is.', where((cell) => mayBeCovered(cell.state))],
    ['partly-placed', 'Only part of the cell is placed.', flagged('partial')],
    ['failed', 'A failing test or an open rework order marks it.', inState('rework')],
    ['awaiting-retest', 'Rework is reported done, the retest is not taken.', inState('awaiting-retest')],
    ['suspect', 'The result that marks it cannot be right: run it again.', inState('suspect')],
    ['recheck', 'Exposed to rain or freeze since its release: look at it first.', inState('recheck')],
    ['not-inspected', 'The foundation is not accepted by inspection.', lift === 0 ? inState('awaiting-test') : []],
    ['superseded-test', 'A test under it was taken before rework or removal.', where((cell) => cell.passes.some((pass) => pass.superseded))],
    ['curve-not-approved', 'A test under it used a curve that is not approved.', where((cell) => cell.passes.some((pass) => !pass.curveApproved))],
    ['passed-after-cover', 'It was covered before the test that speaks for it, and none was taken down in it.', where(passedAfterCover)],
    ['gauge-not-checked', notCheckedWords(cells), where((cell) => cell.passes.some((pass) => pass.gauge?.kind === 'not-checked'))],
    ['frequency-short', 'No passing test speaks for all of it.', lift === 0 ? [] : inState('awaiting-test')],
    ['tests-owed', `These are the last cells of the lot, and it owes ${lot.owed === 1 ? '1 test' : `${lot.owed} tests`}.`, last ? [...requested] : []],
    ['thickness', 'Its surveyed thickness is outside what the specification allows.', where((cell) => cell.thicknessOff)],
  ])
  const amber = found([
    ['near-limit', 'The result is within the repeatability of the method of a limit.', flagged('near')],
    ['far-reach', 'It lies far from the test that speaks for it.', where((cell) => cell.far)],
    ['gauge-checks', 'The lot owes a sand cone or oven check of its gauge tests.', lot.gaugeChecksOwed > 0 ? [...requested] : []],
    ['gauge-not-named', notNamedWords(cells), where((cell) => cell.passes.some((pass) => pass.gauge?.kind === 'not-named'))],
    ['below-unresolved', 'A layer beneath it was covered too early and is not resolved.', flagged('doubt')],
  ])
  const verdict = red.length === 0 ? 'free' : red.every((finding) => OVERRIDABLE.includes(finding.code)) ? 'with-reason' : 'blocked'
  return { red, amber, verdict }
}

/** The gauge troubles of one kind behind the cells, each test once, by its number. */
function troubles(cells: readonly ReleaseCell[], kind: GaugeTrouble['kind']): GaugeTrouble[] {
  const found = cells.flatMap((cell) => cell.passes.flatMap(({ gauge }) => (gauge?.kind === kind ? [gauge] : [])))
  return [...new Map(found.map((trouble) => [trouble.test, trouble])).values()].sort((a, b) => (a.test < b.test ? -1 : 1))
}

const together = (tests: readonly GaugeTrouble[]): string => tests.map((trouble) => trouble.test).join(', ')

function notCheckedWords(cells: readonly ReleaseCell[]): string {
  const tests = troubles(cells, 'not-checked')
  const why = [...new Set(tests.map((trouble) => trouble.message))].join(' ')
  return `${together(tests)} ${tests.length === 1 ? 'rests' : 'rest'} on a gauge that was not checked. ${why} Record that day’s count, or test again.`
}

function notNamedWords(cells: readonly ReleaseCell[]): string {
  const tests = troubles(cells, 'not-named')
  return `${together(tests)} ${tests.length === 1 ? 'names' : 'name'} no gauge of the register.`
}

/** A covered layer is cleared by passes sampled before the cover, or by one taken in an excavation down to this cell. */
function passedAfterCover({ cell, coveredAt, passes }: ReleaseCell): boolean {
  if (coveredAt === null || passes.some((pass) => pass.cell === cell)) return false
  return passes.some((pass) => pass.sampledAt > coveredAt)
}

function found(checks: readonly (readonly [ReleaseCode, string, readonly number[]])[]): ReleaseFinding[] {
  return checks.filter(([, , cells]) => cells.length > 0).map(([code, message, cells]) => ({ code, message, cells }))
}
