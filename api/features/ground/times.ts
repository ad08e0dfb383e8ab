import { invalid } from '#api/errors.ts'

/** A phone's clock may run a little ahead of the server's. */
const CLOCK_LEEWAY_MS = 5 * 60_000

/** The time an act happened; refused when it has not happened yet. */
export function notInFuture(happenedAt: Date, now: Date): Date {
  if (happenedAt.getTime() > now.getTime() + CLOCK_LEEWAY_MS) {
    throw invalid('The time given lies in the future. Check the date and time; what you entered was kept.')
  }
  return happenedAt
}
