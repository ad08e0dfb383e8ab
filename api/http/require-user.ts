import type { Request, RequestHandler } from 'express'
import { notSignedIn } from '#api/errors.ts'

/** 401 unless somebody is signed in. */
export const requireUser: RequestHandler = (req, _res, next) => {
  next(req.user ? undefined : notSignedIn())
}

/** Who is signed in. */
export function userOf(req: Request): Express.User {
  if (!req.user) throw notSignedIn()
  return req.user
}
