import type { DefaultEventsMap, Server, Socket } from 'socket.io'
import type { ClientToServerEvents, ServerToClientEvents } from '#shared/realtime.ts'

interface SocketData {
  userId: string
}

export type BoardServer = Server<ClientToServerEvents, ServerToClientEvents, DefaultEventsMap, SocketData>
export type BoardSocket = Socket<ClientToServerEvents, ServerToClientEvents, DefaultEventsMap, SocketData>
