import { randomUUID } from 'node:crypto'
import { once } from 'node:events'
import { setTimeout as sleep } from 'node:timers/promises'
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import { tellHeads } from '#api/realtime/tell-heads.ts'
import { decodePatch, encodePatch } from '#shared/ground-codec.ts'
import { bytesOf } from '#shared/realtime.ts'
import type { JoinAnswer, ServerEvent, ServerToClientEvents } from '#shared/realtime.ts'
import { buildPatch } from '#tests/factories/ground-patch.ts'
import { buildSite } from '#tests/factories/site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp, TestSocket, Visitor } from '#tests/setup/api.ts'

let app: TestApp
let siteId: string
let lead: SignedIn

beforeAll(async () => {
  app = await testApp()
})

afterAll(() => app.end())

beforeEach(async () => {
  siteId = (await buildSite(app.dataSource.manager)).id
  lead = await app.signedIn('qc-lead', siteId)
})

async function connected(visitor: Visitor): Promise<TestSocket> {
  const socket = app.connect(visitor)
  await new Promise<void>((resolve, reject) => {
    socket.once('connect', resolve)
    socket.once('connect_error', reject)
  })
  return socket
}

async function joined(visitor: Visitor): Promise<TestSocket> {
  const socket = await connected(visitor)
  expect(await join(socket)).toMatchObject({ ok: true })
  return socket
}

function join(socket: TestSocket, site = siteId): Promise<JoinAnswer> {
  return new Promise((resolve) => socket.emit('site:join', site, resolve))
}

function next<T extends ServerEvent['type']>(socket: TestSocket, type: T): Promise<Extract<ServerEvent, { type: T }>> {
  return new Promise((resolve) => socket.once(type, resolve as unknown as ServerToClientEvents[T] as never))
}

function refusal(socket: TestSocket): Promise<string> {
  return new Promise((resolve) => {
    socket.once('connect', () => resolve('connected'))
    socket.once('connect_error', () => resolve('refused'))
  })
}

function heard(socket: TestSocket): string[] {
  const types: string[] = []
  socket.onAny((type: string) => types.push(type))
  return types
}

function write(change: (lot: string) => { patch?: boolean } = () => ({ patch: true }), lot = 'lot-1') {
  return writeToSite(app.deps, { siteId, userId: lead.user.id, verb: 'site.setup' }, async (site) => {
    if (change(lot).patch) site.patch(buildPatch({ lots: [lot] }))
    site.changed('lot', lot)
  })
}

describe('the handshake', () => {
  it('refuses somebody who is not signed in', async () => {
    expect(await refusal(app.connect(null))).toBe('refused')
    const visitor = app.visitor()
    await visitor.post('/api/nothing')
    expect(await refusal(app.connect(visitor))).toBe('refused')
  })

  it('refuses a page of another origin, and lets the server’s own in', async () => {
    expect(await refusal(app.connect(lead, { Origin: 'https://elsewhere.example' }))).toBe('refused')
    expect(await refusal(app.connect(lead, { Origin: 'null' }))).toBe('refused')
    expect(await refusal(app.connect(lead, { Origin: app.url }))).toBe('connected')
  })
})

describe('site:join', () => {
  it('tells a member the revision, and a stranger that the site is not there', async () => {
    await write()
    expect(await join(await connected(lead))).toEqual({ ok: true, revision: 1 })
    const stranger = await connected(await app.signedIn())
    expect(await join(stranger)).toEqual({ ok: false, code: 'not_found' })
    expect(await join(stranger, randomUUID())).toEqual({ ok: false, code: 'not_found' })
  })

  it('leaves a stranger deaf to the site', async () => {
    const stranger = await connected(await app.signedIn())
    await join(stranger)
    const types = heard(stranger)
    const member = await joined(lead)
    const patch = next(member, 'ground:patch')
    await write()
    await patch
    await sleep(50)
    expect(types).toEqual([])
  })

  it('survives a message that is none', async () => {
    const socket = await connected(lead)
    const raw = socket as unknown as { emit: (type: string, ...args: unknown[]) => void }
    raw.emit('site:join', { $ne: 1 }, 'no function')
    raw.emit('site:join')
    raw.emit('site:leave', 7)
    expect(await join(socket)).toMatchObject({ ok: true })
  })
})

describe('a committed change', () => {
  it('reaches another member’s board: the patch, then what changed', async () => {
    const technician = await app.signedIn('technician', siteId)
    const board = await joined(technician)
    const types = heard(board)
    const [patch, changed] = [next(board, 'ground:patch'), next(board, 'site:changed')]
    await write()
    const message = await patch
    expect(message).toMatchObject({ siteId, revision: 1 })
    expect(message.patches.map((body) => decodePatch(bytesOf(body)))).toMatchObject([{ revision: 1, lots: ['lot-1'] }])
    expect(await changed).toMatchObject({ siteId, resource: 'lot', id: 'lot-1', revision: 1 })
    expect(types).toEqual(['ground:patch', 'site:changed'])
  })

  it('is told with others of the same moment when the site is busy, in the order of revisions and without loss', async () => {
    const board = await joined(lead)
    const messages: number[][] = []
    const changes: string[] = []
    board.on('ground:patch', ({ patches }) => messages.push(patches.map((body) => decodePatch(bytesOf(body)).revision)))
    board.on('site:changed', ({ id }) => changes.push(id))
    await Promise.all(Array.from({ length: 12 }, (_, i) => write(undefined, `lot-${i % 2}`)))
    await vi.waitFor(() => expect(new Set(changes)).toEqual(new Set(['lot-0', 'lot-1'])), { timeout: 5_000 })
    await vi.waitFor(() => expect(messages.flat()).toHaveLength(12), { timeout: 5_000 })
    expect(messages.flat()).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12])
    expect(messages.length).toBeLessThan(12)
  })

  it('is told whole when more patches wait than one message can carry', async () => {
    const board = await joined(lead)
    const revisions: number[] = []
    board.on('ground:patch', ({ patches }) => revisions.push(...patches.map((body) => decodePatch(bytesOf(body)).revision)))
    const patches = Array.from({ length: 40 }, (_, i) => ({ type: 'patch' as const, siteId, revision: i + 1, body: encodePatch({ ...buildPatch({}), revision: i + 1, base: i }) }))
    app.deps.publisher.publish(patches)
    await vi.waitFor(() => expect(revisions).toHaveLength(40), { timeout: 5_000 })
    expect(revisions).toEqual(patches.map((patch) => patch.revision))
    expect(board.connected).toBe(true)
  })

  it('is not heard after site:leave', async () => {
    const board = await joined(lead)
    const types = heard(board)
    board.emit('site:leave', siteId)
    await join(board, randomUUID())
    await write()
    await sleep(80)
    expect(types).toEqual([])
  })
})

describe('the head', () => {
  it('is told to every open site from the database', async () => {
    const board = await joined(lead)
    await write(() => ({}))
    const head = next(board, 'ground:head')
    await tellHeads(app.deps, app.io)
    expect(await head).toEqual({ type: 'ground:head', siteId, revision: 1 })
  })
})

describe('a change of membership', () => {
  it('taken away: the board leaves the room and is told', async () => {
    const technician = await app.signedIn('technician', siteId)
    const board = await joined(technician)
    const told = next(board, 'membership:changed')
    await lead.delete(`/api/sites/${siteId}/members/${technician.user.id}`)
    expect(await told).toEqual({ type: 'membership:changed', siteId, role: null })
    const types = heard(board)
    await write()
    await sleep(80)
    expect(types).toEqual([])
    expect(await join(board)).toEqual({ ok: false, code: 'not_found' })
  })

  it('given: the person is told the role, wherever signed in', async () => {
    const person = await app.signedIn()
    const board = await connected(person)
    const told = next(board, 'membership:changed')
    await lead.post(`/api/sites/${siteId}/members`, { email: person.user.email, role: 'operator' })
    expect(await told).toEqual({ type: 'membership:changed', siteId, role: 'operator' })
  })
})

describe('signing out', () => {
  it('closes the sockets of that session and of no other', async () => {
    const board = await joined(lead)
    const elsewhere = app.visitor()
    await elsewhere.signIn(lead.user.email)
    const other = await connected(elsewhere)
    const closed = once(board as unknown as NodeJS.EventEmitter, 'disconnect')
    await lead.delete('/api/session')
    expect(await closed).toContain('io server disconnect')
    await sleep(30)
    expect(other.connected).toBe(true)
    expect(await refusal(app.connect(lead))).toBe('refused')
  })
})
