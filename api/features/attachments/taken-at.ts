import { TZDate } from '@date-fns/tz'
import type { ExifTime } from '#api/files/exif-time.ts'

/** A camera whose clock was never set starts at some year before this. */
const FIRST_YEAR = 2005
const LEEWAY_MS = 5 * 60_000

interface Taken {
  readonly takenAt: Date
  readonly takenFrom: 'camera' | 'upload'
}

/**
 * When a photo was taken: by its camera's clock, on the site's time zone where the camera says none. A camera that says nothing,
 * a day that is none or a time to come counts for nothing: then it is when the photo was added.
 */
export function takenAtOf(taken: ExifTime | null, now: Date, timeZone: string): Taken {
  const added = { takenAt: now, takenFrom: 'upload' } as const
  if (taken === null) return added
  const takenAt = new Date(taken.offset === null ? localInstant(taken.local, timeZone) : `${taken.local}${taken.offset}`)
  const time = takenAt.getTime()
  if (Number.isNaN(time) || takenAt.getUTCFullYear() < FIRST_YEAR || time > now.getTime() + LEEWAY_MS) return added
  return { takenAt, takenFrom: 'camera' }
}

function localInstant(local: string, timeZone: string): number {
  if (Number.isNaN(new Date(`${local}Z`).getTime())) return NaN
  const [year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0] = local.split(/\D/).map(Number)
  return new TZDate(year, month - 1, day, hour, minute, second, timeZone).getTime()
}
