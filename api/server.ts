import { createServer as createHttpServer } from 'node:http'
import type { Server as HttpServer } from 'node:http'
import { Server } from 'socket.io'
import { createApp } from '#api/app.ts'
import type { Deps } from '#api/deps.ts'
import { createObjectStore } from '#api/files/object-store.ts'
import { createAuthentication } from '#api/http/authentication.ts'
import { createPublisher } from '#api/realtime/publish.ts'
import { attachRealtime } from '#api/realtime/server.ts'
import type { BoardServer } from '#api/realtime/socket-types.ts'
import { startTellingHeads } from '#api/realtime/tell-heads.ts'

export interface HardpanServer {
  readonly deps: Deps
  readonly http: HttpServer
  readonly io: BoardServer
  /** takes no new request, closes the sockets, waits for what is running; the database stays open */
  close(): Promise<void>
}

/** The whole server, not yet listening: pages, API and sockets on one port. */
export function createServer(given: Omit<Deps, 'publisher' | 'objects'>): HardpanServer {
  const io: BoardServer = new Server()
  const deps: Deps = { ...given, publisher: createPublisher(io), objects: createObjectStore(given.env) }
  const authentication = createAuthentication(deps.dataSource, deps.env)
  const http = createHttpServer(createApp(deps, authentication))
  attachRealtime(io, http, deps, authentication)
  const stopTelling = startTellingHeads(deps, io)
  return {
    deps,
    http,
    io,
    async close() {
      stopTelling()
      http.closeIdleConnections()
      await io.close()
      await authentication.close()
      deps.objects.close()
    },
  }
}
