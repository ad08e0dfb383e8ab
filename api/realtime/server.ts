import type { IncomingMessage, Server as HttpServer, ServerResponse } from 'node:http'
import type { RequestHandler } from 'express'
import type { Deps } from '#api/deps.ts'
import type { Env } from '#api/env.ts'
import type { Authentication } from '#api/http/authentication.ts'
import { serveRooms } from '#api/realtime/rooms.ts'
import type { BoardServer } from '#api/realtime/socket-types.ts'
import { sessionRoom, userRoom } from '#shared/realtime.ts'

type Handshake = IncomingMessage & { _query?: { sid?: string }; user?: Express.User; sessionID?: string }
type EngineHandler = (req: Handshake, res: ServerResponse, next: (error?: unknown) => void) => void

/** The session is read once, at the handshake; later frames of the same socket carry its id. */
function onlyForHandshake(handler: EngineHandler): EngineHandler {
  return (req, res, next) => (req._query?.sid === undefined ? handler(req, res, next) : next())
}

const refuseStrangers: EngineHandler = (req, res, next) => {
  if (req.user) {
    next()
    return
  }
  res.writeHead(401, { 'Content-Type': 'application/json' })
  res.end(JSON.stringify({ code: 'not_signed_in', message: 'Sign in first.' }))
}

/** A page of another origin must not open sockets with a person's cookie. Programs other than browsers send no Origin. */
function isOwnOrigin({ headers }: IncomingMessage, { ALLOWED_ORIGINS }: Env): boolean {
  const { origin, host } = headers
  if (origin === undefined) return true
  if (ALLOWED_ORIGINS.split(',').some((allowed) => allowed.trim() === origin)) return true
  return URL.canParse(origin) && new URL(origin).host === host
}

/** Puts the sockets on the server, behind the session and the Origin check. */
export function attachRealtime(io: BoardServer, httpServer: HttpServer, deps: Deps, authentication: Authentication): void {
  io.attach(httpServer, {
    serveClient: false,
    maxHttpBufferSize: 10_000,
    allowRequest: (req, decide) => decide(null, isOwnOrigin(req, deps.env)),
  })
  for (const handler of authentication.handlers as readonly RequestHandler[]) {
    io.engine.use(onlyForHandshake(handler as unknown as EngineHandler))
  }
  io.engine.use(onlyForHandshake(refuseStrangers))
  io.on('connection', (socket) => {
    const { user, sessionID } = socket.request as Handshake
    if (!user || !sessionID) {
      socket.disconnect(true)
      return
    }
    socket.data.userId = user.id
    void socket.join([userRoom(user.id), sessionRoom(sessionID)])
    serveRooms(deps, socket)
  })
}
