import type { AddressInfo } from 'node:net'
import { pino } from 'pino'
import { io as connectSocket } from 'socket.io-client'
import type { Socket } from 'socket.io-client'
import request from 'supertest'
import type { Test } from 'supertest'
import { inject } from 'vitest'
import type { DataSource } from 'typeorm'
import type { UserEntity } from '#api/entities/user.entity.ts'
import { readEnv } from '#api/env.ts'
import { createServer } from '#api/server.ts'
import type { HardpanServer } from '#api/server.ts'
import type { Role } from '#shared/policies/role.ts'
import type { ClientToServerEvents, ServerToClientEvents } from '#shared/realtime.ts'
import { buildMembership } from '#tests/factories/membership.ts'
import { PASSWORD, buildUser } from '#tests/factories/user.ts'
import { closeTestDataSource, testDataSource } from './test-data-source.ts'

export type TestSocket = Socket<ServerToClientEvents, ClientToServerEvents>

type Agent = ReturnType<typeof request.agent>

export interface Upload {
  readonly bytes: Buffer
  readonly name: string
  readonly type?: string
}

/** A browser: keeps its cookies and sends the session's token with every change. */
export interface Visitor {
  readonly agent: Agent
  get(path: string): Test
  post(path: string, body?: object): Promise<request.Response>
  put(path: string, body?: object): Promise<request.Response>
  patch(path: string, body?: object): Promise<request.Response>
  delete(path: string, body?: object): Promise<request.Response>
  /** sends a file as a multipart form */
  upload(path: string, fields: Readonly<Record<string, string>>, file: Upload | null): Promise<request.Response>
  signIn(email: string, password?: string): Promise<request.Response>
  /** the Cookie header, for sockets */
  cookie(): string
}

export interface SignedIn extends Visitor {
  readonly user: UserEntity
}

export interface TestApp extends HardpanServer {
  readonly dataSource: DataSource
  readonly url: string
  visitor(): Visitor
  /** a fresh person, signed in; a member of the site when role and site are given */
  signedIn(role?: Role, siteId?: string): Promise<SignedIn>
  connect(visitor: Visitor | null, headers?: Record<string, string>): TestSocket
  /** for afterAll: ends sockets, server and database connections */
  end(): Promise<void>
}

/** The real application on a port of its own and the database of this worker. */
export async function testApp(settings: Record<string, string> = {}): Promise<TestApp> {
  const dataSource = await testDataSource()
  const env = readEnv({
    NODE_ENV: 'test',
    DATABASE_URL: 'mysql://only-to-satisfy-the-form@127.0.0.1/hardpan',
    SESSION_SECRET: 'only-for-the-tests-0123456789-abcdefghij',
    LOG_LEVEL: 'silent',
    ...inject('objectStore'),
    ...settings,
  })
  const server = createServer({ env, dataSource, clock: () => new Date(), logger: pino({ level: 'silent' }) })
  await new Promise<void>((resolve) => server.http.listen(0, '127.0.0.1', resolve))
  const url = `http://127.0.0.1:${(server.http.address() as AddressInfo).port}`
  const sockets: TestSocket[] = []
  const visitor = () => createVisitor(url)
  return {
    ...server,
    dataSource,
    url,
    visitor,
    async signedIn(role, siteId) {
      const user = await buildUser(dataSource.manager)
      if (role && siteId) await buildMembership(dataSource.manager, { role, siteId, userId: user.id })
      const browser = visitor()
      const answer = await browser.signIn(user.email)
      if (answer.status !== 200) throw new Error(`The sign-in of a built person answered ${answer.status}`)
      return { ...browser, user }
    },
    connect(browser, headers = {}) {
      const socket: TestSocket = connectSocket(url, {
        transports: ['websocket'],
        reconnection: false,
        forceNew: true,
        extraHeaders: { ...(browser ? { Cookie: browser.cookie() } : {}), ...headers },
      })
      sockets.push(socket)
      return socket
    },
    async end() {
      for (const socket of sockets) socket.disconnect()
      await server.close()
      await closeTestDataSource()
    },
  }
}

function createVisitor(url: string): Visitor {
  const agent = request.agent(url)
  let token: string | null = null
  let cookies = ''

  async function tokenOfSession(): Promise<string> {
    if (token !== null) return token
    const me = remember(await agent.get('/api/me'))
    token = (me.body as { csrfToken: string }).csrfToken
    return token
  }

  async function send(method: 'post' | 'put' | 'patch' | 'delete', path: string, body?: object): Promise<request.Response> {
    const ours = await tokenOfSession()
    return remember(await agent[method](path).set('x-csrf-token', ours).send(body))
  }

  async function upload(path: string, fields: Readonly<Record<string, string>>, file: Upload | null): Promise<request.Response> {
    const ours = await tokenOfSession()
    const sent = agent.post(path).set('x-csrf-token', ours).field({ ...fields })
    if (file !== null) void sent.attach('file', file.bytes, { filename: file.name, ...(file.type === undefined ? {} : { contentType: file.type }) })
    return remember(await sent)
  }

  function remember(answer: request.Response): request.Response {
    const given = answer.headers['set-cookie'] as unknown as string[] | undefined
    if (given) cookies = given.map((cookie) => cookie.split(';')[0]).join('; ')
    return answer
  }

  return {
    agent,
    get: (path) => agent.get(path),
    post: (path, body) => send('post', path, body),
    put: (path, body) => send('put', path, body),
    patch: (path, body) => send('patch', path, body),
    delete: (path, body) => send('delete', path, body),
    upload,
    async signIn(email, password = PASSWORD) {
      const answer = await send('post', '/api/session', { email, password })
      token = null
      return answer
    },
    cookie: () => cookies,
  }
}
