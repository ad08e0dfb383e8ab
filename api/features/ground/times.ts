import { invalid } from '#api/errors.ts'
import { refusal } from '#api/http/refuse-input.ts'

/** A phone's clock may run a little ahead of the server's. */
const CLOCK_LEEWAY_MS = 5 * 60_000

/**
 * The time an act happened; refused when it has not happened yet.
 * @param path the request's field it stands in, 'body.sampledAt'; the refusal names it
 */
export function notInFuture(happenedAt: Date, now: Date, path?: string): Date {
  if (happenedAt.getTime() <= now.getTime() + CLOCK_LEEWAY_MS) return happenedAt
  const message = 'The time given lies in the future. Check the date and time'
  throw path === undefined ? invalid(`${message}; what you entered was kept.`) : refusal([{ path, message: `${message}.` }])
}
