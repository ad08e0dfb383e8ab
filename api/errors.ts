import type { ErrorCode } from '#shared/error-codes.ts'

interface AppErrorOptions {
  readonly code: ErrorCode
  readonly status: number
  readonly message: string
  readonly details?: unknown
  /** false means: somebody should look at the log now */
  readonly expected?: boolean
  readonly cause?: unknown
}

/** The one error the API throws on purpose; its message is shown to people. */
export class AppError extends Error {
  readonly code: ErrorCode
  readonly status: number
  readonly details: unknown
  readonly expected: boolean

  constructor({ code, status, message, details, expected = true, cause }: AppErrorOptions) {
    super(message, { cause })
    this.name = 'AppError'
    this.code = code
    this.status = status
    this.details = details
    this.expected = expected
  }
}

export function invalid(message: string, details?: unknown): AppError {
  return new AppError({ code: 'invalid', status: 400, message, details })
}

export function notSignedIn(message = 'You are signed out. Sign in and try again; nothing was saved.'): AppError {
  return new AppError({ code: 'not_signed_in', status: 401, message })
}

export function forbidden(message = 'Your role on this site does not allow that. Nothing was changed.'): AppError {
  return new AppError({ code: 'forbidden', status: 403, message })
}

export function notFound(message = 'There is nothing here that you can see. Check the address, or ask the QC lead for access.'): AppError {
  return new AppError({ code: 'not_found', status: 404, message })
}

type ConflictCode = Extract<
  ErrorCode,
  'conflict' | 'id_reused' | 'covered_too_early' | 'lift_differs' | 'release_blocked'
>

/** 409: the request is well formed, but what stands on the site does not allow it. */
export function conflict(message: string, details?: unknown, code: ConflictCode = 'conflict'): AppError {
  return new AppError({ code, status: 409, message, details })
}

export function tooManyRequests(message: string, details?: unknown): AppError {
  return new AppError({ code: 'too_many_requests', status: 429, message, details })
}

export function tooLarge(message: string): AppError {
  return new AppError({ code: 'too_large', status: 413, message })
}

export function unavailable(message: string, cause?: unknown): AppError {
  return new AppError({ code: 'unavailable', status: 503, message, expected: false, cause })
}
