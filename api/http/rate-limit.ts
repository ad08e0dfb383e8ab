import type { Request, RequestHandler } from 'express'
import { ipKeyGenerator, rateLimit } from 'express-rate-limit'
import { tooManyRequests } from '#api/errors.ts'
import { userOf } from '#api/http/require-user.ts'

const WINDOW_MS = 15 * 60_000
/** wrong passwords for one e-mail address from one network address, and for any of them, in the window */
export const SIGN_IN_LIMITS = { perAccount: 10, perAddress: 100 } as const

interface Counted {
  readonly limit: number
  readonly keyOf: (req: Request) => string
}

function limitFailures({ limit, keyOf }: Counted): RequestHandler {
  return rateLimit({
    windowMs: WINDOW_MS,
    limit,
    keyGenerator: keyOf,
    skipSuccessfulRequests: true,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    handler: (_req, _res, next) => {
      next(
        tooManyRequests('Too many sign-ins with a wrong password. Wait a quarter of an hour, then try again.', {
          retryAfterSeconds: WINDOW_MS / 1000,
        }),
      )
    },
  })
}

function addressOf(req: Request): string {
  return ipKeyGenerator(req.ip ?? '')
}

function emailOf(req: Request): string {
  const { email } = (req.body ?? {}) as { email?: unknown }
  return typeof email === 'string' ? email.trim().toLowerCase().slice(0, 254) : ''
}

/** Slows down the guessing of passwords; a right one is never counted. */
export function limitSignIns(): RequestHandler[] {
  return [
    limitFailures({ limit: SIGN_IN_LIMITS.perAddress, keyOf: addressOf }),
    limitFailures({ limit: SIGN_IN_LIMITS.perAccount, keyOf: (req) => `${addressOf(req)} ${emailOf(req)}` }),
  ]
}

/** Files one person may send in the window, taken or refused. */
export const UPLOAD_LIMIT = 200

/** Keeps one account from filling the store, or from keeping the server at decoding pictures. */
export function limitUploads(): RequestHandler {
  return rateLimit({
    windowMs: WINDOW_MS,
    limit: UPLOAD_LIMIT,
    keyGenerator: (req) => userOf(req).id,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    handler: (_req, _res, next) => {
      next(
        tooManyRequests(`That is more than ${UPLOAD_LIMIT} files in a quarter of an hour. This one was not added; wait a little, then try again.`, {
          retryAfterSeconds: WINDOW_MS / 1000,
        }),
      )
    },
  })
}
