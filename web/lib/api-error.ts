import { z } from 'zod'

export const errorBodySchema = z.object({
  code: z.string(),
  message: z.string(),
  details: z.unknown().optional(),
  requestId: z.string().optional(),
})

type ApiErrorParts = { status: number; code: string; message: string; details?: unknown; requestId?: string | undefined }

/**
 * An answer of the API that is not the one asked for. Two codes are the client's own: `unreachable` (status 0, no
 * answer came) and `unreadable` (an answer came that is not what the API promises).
 */
export class ApiError extends Error {
  readonly status: number
  readonly code: string
  readonly details: unknown
  readonly requestId: string | undefined

  constructor({ status, code, message, details, requestId }: ApiErrorParts) {
    super(message)
    this.name = 'ApiError'
    this.status = status
    this.code = code
    this.details = details
    this.requestId = requestId
  }
}

export function isApiError(error: unknown): error is ApiError {
  return error instanceof ApiError
}
