import type { RequestHandler } from 'express'
import createStoreClass from 'express-mysql-session'
import session from 'express-session'
import type { Pool } from 'mysql2'
import passportModule from 'passport'
import { Strategy as LocalStrategy } from 'passport-local'
import type { DataSource } from 'typeorm'
import type { Env } from '#api/env.ts'
import { findUserByPassword } from '#api/features/session/find-user-by-password.ts'
import { UserEntity } from '#api/entities/user.entity.ts'

const FORTNIGHT_MS = 14 * 24 * 3_600_000

export interface Authentication {
  readonly passport: Passport
  /** reads the session and who is signed in; the same for requests and for the handshake of sockets */
  readonly handlers: readonly RequestHandler[]
  close(): Promise<void>
}

function sessionStore(dataSource: DataSource) {
  const Store = createStoreClass(session)
  const { pool } = dataSource.driver as unknown as { pool: Pool }
  return new Store(
    { createDatabaseTable: false, clearExpired: true, endConnectionOnClose: false, schema: { tableName: 'session' } },
    pool.promise(),
  )
}

export type Passport = InstanceType<typeof passportModule.Passport>

function createPassport(dataSource: DataSource): Passport {
  const passport = new passportModule.Passport()
  passport.use(
    new LocalStrategy({ usernameField: 'email', session: true }, (email, password, done) => {
      findUserByPassword(dataSource.manager, email, password).then((user) => done(null, user ?? false), done)
    }),
  )
  passport.serializeUser<string>((user, done) => done(null, user.id))
  passport.deserializeUser<string>((id, done) => {
    dataSource.manager
      .findOne(UserEntity, { where: { id }, select: { id: true, email: true, name: true } })
      .then((user) => done(null, user ? { id: user.id, email: user.email, name: user.name } : false), done)
  })
  return passport
}

/** Sessions in the database, passwords by passport. */
export function createAuthentication(dataSource: DataSource, env: Env): Authentication {
  const store = sessionStore(dataSource)
  const passport = createPassport(dataSource)
  const readSession = session({
    name: 'hardpan.sid',
    secret: env.SESSION_SECRET,
    store,
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: { httpOnly: true, sameSite: 'lax', secure: 'auto', maxAge: FORTNIGHT_MS, path: '/' },
  })
  return {
    passport,
    handlers: [readSession, passport.session() as RequestHandler],
    close: () => store.close(),
  }
}
