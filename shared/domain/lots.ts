/** What a zone's lots are cut by. `lift-day`: a new lot each working day; `lift`: one lot as long as pieces touch. */
export const LOT_BASES = ['lift-day', 'lift'] as const

export type LotBasis = (typeof LOT_BASES)[number]

export interface LotKeyParts {
  readonly zoneId: string
  readonly lift: number
  /** a lot has one source and one process, so material is part of its key (practice 3.7, after FHWA) */
  readonly materialId: string
  /** YYYY-MM-DD, as workDay gives it */
  readonly day: string
}

/** The key under which fill is one lot, as long as its pieces touch. @returns parts joined by "|" */
export function lotKey(basis: LotBasis, { zoneId, lift, materialId, day }: LotKeyParts): string {
  const key = `${zoneId}|${lift}|${materialId}`
  return basis === 'lift-day' ? `${key}|${day}` : key
}

/**
 * The working day an instant belongs to: the site's calendar day, where the hours before the cut still belong to the
 * day before (a night shift is one day). Counted on the site's clock, so a change to summer time moves no fill.
 * @param happenedAtMs epoch milliseconds
 * @param timeZone IANA name, as the site has it
 * @param cutHour 0 to 23, default 5
 * @returns YYYY-MM-DD
 * @throws RangeError for a name that is no time zone
 */
export function workDay(happenedAtMs: number, timeZone: string, cutHour = 5): string {
  const format = new Intl.DateTimeFormat('en-US', {
    timeZone,
    calendar: 'gregory',
    numberingSystem: 'latn',
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
  })
  const parts = new Map(format.formatToParts(happenedAtMs).map((part) => [part.type, Number(part.value)]))
  const part = (type: Intl.DateTimeFormatPartTypes) => parts.get(type) ?? Number.NaN
  const before = part('hour') < cutHour ? 1 : 0
  return new Date(Date.UTC(part('year'), part('month') - 1, part('day') - before)).toISOString().slice(0, 10)
}
