import { TZDate } from '@date-fns/tz'
import { addDays } from 'date-fns'
import { workDay } from '#shared/domain/lots.ts'

const CUT_HOUR = 5
const SUNDAY = 0
/** the longest stretch of today's shift that is played */
const SHIFT_MS = 9.5 * 3_600_000

/** The clock of the demo's days: regular hours before today, today squeezed between the day's cut and now. */
export interface Calendar {
  /** working days before today, oldest first */
  readonly days: readonly Day[]
  readonly today: Day
}

export interface Day {
  /** the instant at an hour of the site's clock (13.5 is half past one) */
  at(hour: number): Date
}

const FIRST_HOUR = 7
const LAST_HOUR = 17

/** The last `count` working days up to `now`, Sundays off. */
export function createCalendar(now: Date, timeZone: string, count: number): Calendar {
  const [year = 0, month = 1, date = 1] = workDay(now.getTime(), timeZone, CUT_HOUR).split('-').map(Number)
  const morning = new TZDate(year, month - 1, date, CUT_HOUR, 0, 0, timeZone)
  const days: Day[] = []
  for (let back = 1; days.length < count; back++) {
    const day = addDays(morning, -back)
    if (day.getDay() === SUNDAY) continue
    days.unshift({ at: (hour) => new Date(day.getTime() + (hour - CUT_HOUR) * 3_600_000) })
  }
  const played = Math.min(SHIFT_MS, now.getTime() - morning.getTime())
  const today: Day = { at: (hour) => new Date(now.getTime() - played * (1 - (hour - FIRST_HOUR) / (LAST_HOUR - FIRST_HOUR))) }
  return { days, today }
}
