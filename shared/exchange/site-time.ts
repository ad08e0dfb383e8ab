import { tzOffset } from '@date-fns/tz'

export type DateOrder = 'ymd' | 'mdy' | 'dmy'

const MINUTE = 60_000
const DAY = 86_400_000
const two = (value: number): string => String(value).padStart(2, '0')

/** Minutes east of Greenwich as they stand behind a time: "-08:00"; undefined where they are no whole minutes. */
function offsetText(minutes: number): string | undefined {
  if (!Number.isInteger(minutes)) return undefined
  const size = Math.abs(minutes)
  return `${minutes < 0 ? '-' : '+'}${two(Math.floor(size / 60))}:${two(size % 60)}`
}

/**
 * An instant on a site's clock with its offset, "2026-12-01T14:32:00-08:00"; parts of a second only where there are any.
 * @param instant ISO-8601, with any offset
 * @param timeZone IANA name
 */
export function writeSiteTime(instant: string, timeZone: string): string {
  const at = new Date(instant)
  const minutes = tzOffset(timeZone, at)
  const offset = offsetText(minutes)
  const local = offset === undefined ? at : new Date(at.getTime() + minutes * MINUTE)
  return `${local.toISOString().slice(0, -1).replace('.000', '')}${offset ?? 'Z'}`
}

export type ReadTime = { readonly ok: true; readonly instant: string } | { readonly ok: false; readonly message: string }

const DATE = /^(\d{1,4})([-/.])(\d{1,2})\2(\d{1,4})(?:[T\s,]+(.*))?$/
const TIME = /^(\d{1,2}):(\d{2})(?::(\d{2})(?:\.(\d{1,3})\d*)?)?\s*([ap])?\.?m?\.?\s*(z|[+-]\d{2}:?\d{2})?$/i

interface ReadTimeOptions {
  readonly timeZone: string
  readonly order: DateOrder
  /** the time of day where it stands in a cell of its own */
  readonly time?: string
  /** "-08:00" where it stands in a cell of its own */
  readonly offset?: string
}

/**
 * An instant of a file: with its offset, or on the site's clock. A time that the clock showed twice or not at all that day is
 * refused, since nobody can tell which it was.
 * @param text "2026-12-01T14:32-08:00", "2026-12-01 14:32", "12/1/2026 2:32 pm", "1.12.2026"
 */
export function readSiteTime(text: string, { timeZone, order, time = '', offset = '' }: ReadTimeOptions): ReadTime {
  const date = DATE.exec(text.trim())
  if (!date) return refuse('Write the date as 2026-12-01, with its time as 14:32.')
  const [, first = '', , second = '', third = '', rest = ''] = date
  const [year, month, day] = first.length === 4 ? [first, second, third] : order === 'dmy' ? [third, second, first] : [third, first, second]
  if (year.length !== 4) return refuse('Give the date with its whole year, such as 2026.')
  const clock = readClock(rest.trim() === '' ? time : isMidnight(rest) && time.trim() !== '' ? time : rest)
  if (clock === null) return refuse(rest.trim() === '' && time.trim() === '' ? 'Give the time of day too, such as 14:32.' : 'Write the time as 14:32.')
  const wall = wallClock(Number(year), Number(month), Number(day), clock.ms)
  if (wall === null) return refuse(`There is no day ${day} of month ${month}. Check the order of day and month.`)
  return onClock(wall, clock.offset ?? (offset.trim() === '' ? undefined : offset.trim()), timeZone)
}

const refuse = (message: string): ReadTime => ({ ok: false, message })
/** What a spreadsheet puts behind a date that has no time. */
const isMidnight = (rest: string): boolean => /^0?0:00(:00)?$/.test(rest.trim())

function readClock(text: string): { ms: number; offset: string | undefined } | null {
  const found = TIME.exec(text.trim().replace(/^\d{1,4}[-/.]\d{1,2}[-/.]\d{1,4}[T\s]+/, ''))
  if (!found) return null
  const [, h = '', m = '', s = '0', fraction = '', half, offset] = found
  const typed = Number(h)
  if (typed > 23 || Number(m) > 59 || Number(s) > 59 || (half !== undefined && (typed < 1 || typed > 12))) return null
  const hour = half === undefined ? typed : (typed % 12) + (half.toLowerCase() === 'p' ? 12 : 0)
  return { ms: ((hour * 60 + Number(m)) * 60 + Number(s)) * 1000 + Number(fraction.padEnd(3, '0')), offset }
}

function wallClock(year: number, month: number, day: number, ms: number): number | null {
  const midnight = new Date(Date.UTC(year, month - 1, day))
  const real = midnight.getUTCFullYear() === year && midnight.getUTCMonth() === month - 1 && midnight.getUTCDate() === day
  return real ? midnight.getTime() + ms : null
}

function onClock(wall: number, offset: string | undefined, timeZone: string): ReadTime {
  const said = (time: number): ReadTime => ({ ok: true, instant: new Date(time).toISOString() })
  if (offset !== undefined) {
    if (/^z$/i.test(offset)) return said(wall)
    const parts = /^([+-])(\d{2}):?(\d{2})$/.exec(offset)
    if (!parts) return refuse('Write the offset from UTC as -08:00.')
    return said(wall - (parts[1] === '-' ? -1 : 1) * (Number(parts[2]) * 60 + Number(parts[3])) * MINUTE)
  }
  const offsets = new Set([tzOffset(timeZone, new Date(wall - DAY)), tzOffset(timeZone, new Date(wall + DAY))])
  const times = [...offsets].map((minutes) => ({ minutes, time: wall - minutes * MINUTE })).filter(({ minutes, time }) => tzOffset(timeZone, new Date(time)) === minutes)
  const [only, other] = times
  if (only === undefined) return refuse('The site’s clock was put forward over this time. Check it.')
  if (other !== undefined) return refuse('The site’s clock showed this time twice that day. Give it with its offset, such as 01:30-07:00.')
  return said(only.time)
}

/** The order of day and month that a column of dates is written in; null where none of them tells. */
export function guessDateOrder(texts: readonly string[]): DateOrder | null {
  const dates = texts.flatMap((text) => {
    const found = DATE.exec(text.trim())
    return found ? [{ first: found[1] ?? '', mark: found[2], second: Number(found[3]) }] : []
  })
  const open = dates.filter(({ first }) => first.length < 3)
  if (open.length === 0) return 'ymd'
  if (open.some(({ first }) => Number(first) > 12)) return 'dmy'
  if (open.some(({ second }) => second > 12)) return 'mdy'
  return open.every(({ mark }) => mark === '.') ? 'dmy' : null
}
