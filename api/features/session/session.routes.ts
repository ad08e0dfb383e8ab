import { Router } from 'express'
import type { Request, Response } from 'express'
import type { Deps } from '#api/deps.ts'
import { AppError } from '#api/errors.ts'
import type { Passport } from '#api/http/authentication.ts'
import { csrfTokenOf } from '#api/http/csrf.ts'
import { limitSignIns } from '#api/http/rate-limit.ts'
import { validate } from '#api/http/validate.ts'
import { meResponseSchema, signInRequestSchema } from '#shared/schemas/session.ts'
import type { MeResponse } from '#shared/schemas/session.ts'

function presentMe(req: Request): MeResponse {
  const { user } = req
  return meResponseSchema.parse({ user: user ? { id: user.id, name: user.name, email: user.email } : null, csrfToken: csrfTokenOf(req) })
}

function checkPassword(passport: Passport, req: Request, res: Response): Promise<Express.User | null> {
  return new Promise((resolve, reject) => {
    const check = passport.authenticate('local', (error: unknown, user: Express.User | false | null) => {
      if (error) reject(error instanceof Error ? error : new Error('The password could not be checked', { cause: error }))
      else resolve(user || null)
    }) as (req: Request, res: Response, next: (error?: unknown) => void) => void
    check(req, res, reject)
  })
}

/** Passport gives the session a new id, so that one planted before the sign-in is worth nothing after it. */
function signIn(req: Request, user: Express.User): Promise<void> {
  return new Promise((resolve, reject) => req.logIn(user, (error: unknown) => (error ? reject(error as Error) : resolve())))
}

function signOut(req: Request): Promise<void> {
  return new Promise((resolve, reject) => req.logOut((error: unknown) => (error ? reject(error as Error) : resolve())))
}

const NO_MATCH = 'E-mail address and password do not match an account. Check both and try again.'

export function sessionRoutes({ publisher }: Deps, passport: Passport): Router {
  const router = Router()

  router.get('/me', (req, res) => {
    res.set('Cache-Control', 'no-store').json(presentMe(req))
  })

  router.post(
    '/session',
    ...limitSignIns(),
    validate({ body: signInRequestSchema }, async (_input, req, res) => {
      const user = await checkPassword(passport, req, res)
      if (!user) throw new AppError({ code: 'not_signed_in', status: 401, message: NO_MATCH })
      await signIn(req, user)
      res.json(presentMe(req))
    }),
  )

  router.delete('/session', async (req, res) => {
    const { sessionID } = req
    await signOut(req)
    publisher.endSession(sessionID)
    res.status(204).end()
  })

  return router
}
