import { QueryFailedError } from 'typeorm'

const LOCK_WAIT_TIMEOUT = 1205
const DEADLOCK = 1213
const RETRIES = 3

function isLockTrouble(error: unknown): boolean {
  if (!(error instanceof QueryFailedError)) return false
  const { errno } = error.driverError as { errno?: number }
  return errno === DEADLOCK || errno === LOCK_WAIT_TIMEOUT
}

/** Runs a whole transaction again, up to three times, when the database broke a tie against it. */
export async function retryDeadlocks<T>(run: () => Promise<T>): Promise<T> {
  for (let attempt = 0; ; attempt++) {
    try {
      return await run()
    } catch (error) {
      if (attempt >= RETRIES || !isLockTrouble(error)) throw error
    }
  }
}
