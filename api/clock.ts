export type Clock = () => Date

/**
 * The server's clock. With a start it runs on from there at the ordinary pace: two writes still have two instants.
 */
export function createClock(startAt?: Date): Clock {
  if (!startAt) return () => new Date()
  const startedAt = Date.now()
  return () => new Date(startAt.getTime() + Date.now() - startedAt)
}
