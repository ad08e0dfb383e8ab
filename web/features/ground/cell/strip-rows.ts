import { hasFlag, type GroundState } from '#shared/domain/ground-state.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import type { Column } from '#shared/schemas/ground.ts'
import { capital } from '#web/features/ground/plan/ground-words.ts'
import type { Units } from '#web/lib/units.ts'

export type ColumnRow = Column['rows'][number]

/** A state in words; on the foundation an inspection is waited for, not a test. */
export function stateWord(state: GroundState, lift: number): string {
  if (lift !== 0) return stateLook(state).word
  if (state === 'awaiting-test') return 'Awaiting inspection'
  return state === 'meets-spec' ? 'Inspected' : stateLook(state).word
}

export interface LogWords {
  readonly title: string
  readonly note: string | undefined
}

/** What stands beside a lift in the strip log: its result where one names it, else its state and why. */
export function logWords(row: ColumnRow, units: Units): LogWords {
  const why = row.why === '' ? undefined : row.why
  if (row.lift === 0) return { title: stateWord(row.state, 0), note: 'foundation' }
  const open = row.state === 'awaiting-test' || row.state === 'awaiting-retest' || row.state === 'suspect'
  if (row.test === null || open) return { title: stateWord(row.state, row.lift), note: why }
  const notes = [`${units.deviation(row.test.moistureDeviation)} from opt.`]
  if (row.state === 'rework') notes.push(row.test.headline.toLowerCase())
  if (hasFlag(row.flags, 'covered')) notes.push('covered too early')
  return { title: units.percent(row.test.rc), note: capital(notes.join(', ')) }
}

/** The lifts the log shows: every placed one, lowest the foundation. */
export function loggedRows(column: Column): ColumnRow[] {
  return column.rows.filter((row) => row.lift === 0 || (row.state !== 'not-placed' && row.state !== 'none'))
}

/** The highest placed lift, or the foundation. */
export function surfaceRow(column: Column): ColumnRow | undefined {
  return loggedRows(column)[0]
}

/** Why the cell may or may not take its next lift, in one line. */
export function whyLine(column: Column): string {
  if (column.zoneId === null) return 'Outside every zone: no fill belongs here.'
  if (column.ready) return column.nextLift === null ? 'At design grade.' : `May receive lift ${column.nextLift}.`
  if (column.blockedBy === null) return ''
  const row = column.rows.find((each) => each.lift === column.blockedBy?.lift)
  // the reason of a suspect says to run it again; what is left to say is which
  const why = row?.state === 'suspect' ? (row.test?.number ?? '') : (row?.why ?? '')
  return `${column.blockedBy.reason}${why === '' || row?.lift === 0 ? '' : `: ${why}`}.`
}
