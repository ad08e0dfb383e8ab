import { csrfSync } from 'csrf-sync'
import type { Request, RequestHandler } from 'express'

const { csrfSynchronisedProtection, generateToken } = csrfSync({
  getTokenFromRequest: (req) => req.get('x-csrf-token'),
})

/** Refuses every change that does not carry the session's token in x-csrf-token. */
export const requireCsrfToken: RequestHandler = csrfSynchronisedProtection

/** The session's token, made at the first call. */
export function csrfTokenOf(req: Request): string {
  return generateToken(req)
}
