import type { ErrorRequestHandler } from 'express'
import type { Logger } from 'pino'
import { QueryFailedError } from 'typeorm'
import { AppError, conflict, invalid, tooLarge, unavailable } from '#api/errors.ts'

const DUPLICATE = 1062
const LOCK_TROUBLE: readonly unknown[] = [1205, 1213]
const NO_CONNECTION: readonly unknown[] = ['ECONNREFUSED', 'ECONNRESET', 'PROTOCOL_CONNECTION_LOST', 'ETIMEDOUT', 'POOL_CLOSED']

interface Tagged {
  readonly type?: unknown
  readonly code?: unknown
  readonly status?: unknown
}

function fromDriver({ driverError }: QueryFailedError): AppError | null {
  const { errno, code } = driverError as { errno?: unknown; code?: unknown }
  if (errno === DUPLICATE) return conflict('This is already recorded. Nothing was saved twice; reload to see it.')
  if (LOCK_TROUBLE.includes(errno)) {
    return unavailable('The site is busy. Nothing was saved and nothing is lost; try again in a moment.', driverError)
  }
  return NO_CONNECTION.includes(code) ? databaseAway(driverError) : null
}

function databaseAway(cause: unknown): AppError {
  return unavailable('The database cannot be reached. Nothing was saved; try again in a minute.', cause)
}

/** What an error that was not thrown on purpose means to the person who asked. */
export function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error
  if (error instanceof QueryFailedError) return fromDriver(error) ?? internal(error)
  const { type, code, status } = (typeof error === 'object' && error !== null ? error : {}) as Tagged
  if (code === 'EBADCSRFTOKEN') {
    return new AppError({
      code: 'csrf',
      status: 403,
      message: 'You signed in or out since this page was loaded, so this was not saved. Reload the page and send it again.',
    })
  }
  if (type === 'entity.too.large') return tooLarge('This is too much to take in at once, so nothing was saved. Shorten the text or send it in parts.')
  if (NO_CONNECTION.includes(code)) return databaseAway(error)
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return invalid('The request could not be read, so nothing was saved. Reload the page and try again.')
  }
  return internal(error)
}

function internal(cause: unknown): AppError {
  return new AppError({
    code: 'internal',
    status: 500,
    message: 'Something went wrong on the server and this was not saved. Try again; if it stays, report the number shown.',
    expected: false,
    cause,
  })
}

/** The one place where an error becomes an answer: { code, message, details?, requestId }. */
export function errorHandler(logger: Logger): ErrorRequestHandler {
  return (error, req, res, next) => {
    const appError = toAppError(error)
    const { requestId } = req
    const line = { requestId, method: req.method, path: req.path, code: appError.code }
    if (appError.expected) logger.info(line, appError.message)
    else logger.error({ ...line, err: appError.cause ?? appError }, appError.message)
    if (res.headersSent) {
      next(error)
      return
    }
    const { code, message, details, status } = appError
    res.status(status).json({ code, message, ...(details === undefined ? {} : { details }), requestId })
  }
}
