import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { ServerEvent } from '#shared/realtime.ts'
import { savedViewListSchema, savedViewSchema } from '#shared/schemas/saved-view.ts'
import type { CreateView, SavedView } from '#shared/schemas/saved-view.ts'
import { buildMembership } from '#tests/factories/membership.ts'
import { openSite, rowsOf } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let other: OpenSite
let lead: SignedIn
let technician: SignedIn
let superintendent: SignedIn

beforeAll(async () => {
  app = await testApp()
  other = await openSite(app)
})
beforeEach(async () => {
  open = await openSite(app)
  lead = open.people['qc-lead']
  technician = open.people.technician
  superintendent = open.people.superintendent
})
afterAll(() => app.end())

const viewInput = (overrides: Partial<CreateView> = {}): CreateView => ({
  id: randomUUID(),
  name: 'Failures',
  shared: false,
  content: { filter: { outcome: ['fail', 'suspect'], lift: 3, near: 'true' }, sort: { key: 'rc', direction: 'asc' }, columns: ['number', 'cell', 'rc', 'rcLimit'] },
  ...overrides,
})

async function save(person: SignedIn, overrides: Partial<CreateView> = {}): Promise<SavedView> {
  const answer = await person.post(open.path('/views'), viewInput(overrides))
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return savedViewSchema.parse(answer.body)
}
const viewsOf = async (person: SignedIn, site = open): Promise<SavedView[]> => savedViewListSchema.parse((await person.get(site.path('/views'))).body).views
const namesOf = async (person: SignedIn): Promise<string[]> => (await viewsOf(person)).map((view) => view.name)

describe('who may keep views', () => {
  it('a signed-out person gets 401, a stranger 404, an operator 403', async () => {
    const stranger = await app.signedIn()
    const { operator } = open.people
    for (const [person, status] of [[app.visitor(), 401], [stranger, 404], [operator, 403]] as const) {
      expect((await person.get(open.path('/views'))).status).toBe(status)
      expect((await person.post(open.path('/views'), viewInput())).status).toBe(status)
      expect((await person.put(open.path('/views/default'), { viewId: null })).status).toBe(status)
      expect((await person.patch(open.path(`/views/${randomUUID()}`), { name: 'Mine' })).status).toBe(status)
      expect((await person.delete(open.path(`/views/${randomUUID()}`))).status).toBe(status)
    }
  })

  it('everybody who sees the registers keeps their own; only quality control shares', async () => {
    for (const role of ['qc-lead', 'technician', 'superintendent', 'owner-rep'] as const) {
      await save(open.people[role])
      const shared = await open.people[role].post(open.path('/views'), viewInput({ name: 'For all', shared: true }))
      expect(shared.status).toBe(role === 'qc-lead' || role === 'technician' ? 201 : 403)
    }
    const own = await save(superintendent, { name: 'Mine' })
    expect((await superintendent.patch(open.path(`/views/${own.id}`), { shared: true })).status).toBe(403)
    expect((await superintendent.patch(open.path(`/views/${own.id}`), { name: 'Mine again', shared: false })).status).toBe(200)
  })
})

describe('a view', () => {
  it('comes back as it was saved, by name', async () => {
    const input = viewInput()
    await save(technician, input)
    await save(technician, { name: 'Doubtful' })
    expect((await viewsOf(technician)).map(({ name }) => name)).toEqual(['Doubtful', 'Failures'])
    expect((await viewsOf(technician))[1]).toEqual({ id: input.id, name: 'Failures', shared: false, author: { id: technician.user.id, name: technician.user.name }, content: input.content, isDefault: false, mayEdit: true })
  })

  it('sent twice is one view; another under its id is refused', async () => {
    const input = viewInput()
    const first = await technician.post(open.path('/views'), input)
    const second = await technician.post(open.path('/views'), input)
    expect(second.body).toEqual(first.body)
    expect(await viewsOf(technician)).toHaveLength(1)
    expect((await technician.post(open.path('/views'), { ...input, name: 'Else' })).status).toBe(409)
  })

  it('of one name is kept once a person; two people may use the same', async () => {
    const first = await save(technician)
    await save(lead)
    const again = await technician.post(open.path('/views'), viewInput())
    expect(again.status).toBe(409)
    expect((again.body as { message: string }).message).toBe('A view is called "Failures" already. Nothing was saved; give it another name.')
    const second = await save(technician, { name: 'Doubtful' })
    expect((await technician.patch(open.path(`/views/${second.id}`), { name: 'Failures' })).status).toBe(409)
    expect((await technician.patch(open.path(`/views/${first.id}`), { name: 'Failures' })).status).toBe(200)
  })

  it('is renamed and refilled; what is not said stays', async () => {
    const view = await save(technician)
    const content: CreateView['content'] = { filter: {}, sort: { key: 'sampled', direction: 'desc' }, columns: ['number', 'lot'] }
    expect((await technician.patch(open.path(`/views/${view.id}`), { name: 'All' })).body).toMatchObject({ name: 'All', content: view.content })
    expect((await technician.patch(open.path(`/views/${view.id}`), { content })).body).toMatchObject({ name: 'All', content })
  })

  it('is really removed, and leaves no trail', async () => {
    const view = await save(technician)
    await technician.put(open.path('/views/default'), { viewId: view.id })
    const before = (await rowsOf(app.dataSource.manager, 'event', open.siteId)).length
    expect((await technician.delete(open.path(`/views/${view.id}`))).status).toBe(204)
    expect(await rowsOf(app.dataSource.manager, 'saved_view', open.siteId)).toEqual([])
    expect(await rowsOf(app.dataSource.manager, 'default_view', open.siteId)).toEqual([])
    expect((await rowsOf(app.dataSource.manager, 'event', open.siteId)).length).toBe(before)
    expect((await technician.delete(open.path(`/views/${view.id}`))).status).toBe(404)
  })

  it.each([
    ['no name', { name: ' ' }],
    ['an unknown column', { content: { ...viewInput().content, columns: ['number', 'colour'] } }],
    ['a column twice', { content: { ...viewInput().content, columns: ['number', 'rc', 'rc'] } }],
    ['no number in front', { content: { ...viewInput().content, columns: ['rc', 'number'] } }],
    ['an unknown order', { content: { ...viewInput().content, sort: { key: 'colour', direction: 'asc' } } }],
    ['an unknown filter', { content: { ...viewInput().content, filter: { colour: 'red' } } }],
    ['days the wrong way round', { content: { ...viewInput().content, filter: { from: '2026-03-02', to: '2026-03-01' } } }],
    ['something else', { colour: 'red' }],
  ])('with %s is refused', async (_, overrides) => {
    expect((await technician.post(open.path('/views'), { ...viewInput(), ...overrides })).status).toBe(400)
    expect(await viewsOf(technician)).toEqual([])
  })
})

describe('a shared view', () => {
  it('is seen by all who see the registers, and changed by its author or the lead alone', async () => {
    const view = await save(technician, { name: 'For all', shared: true })
    for (const role of ['qc-lead', 'technician', 'superintendent', 'owner-rep'] as const) {
      const [seen] = await viewsOf(open.people[role])
      expect(seen).toMatchObject({ id: view.id, author: { name: technician.user.name }, mayEdit: role === 'technician' || role === 'qc-lead' })
    }
    const colleague = await app.signedIn('technician', open.siteId)
    for (const person of [colleague, superintendent]) {
      const refused = await person.patch(open.path(`/views/${view.id}`), { name: 'Taken over' })
      expect(refused.status).toBe(403)
      expect((refused.body as { message: string }).message).toContain(`changed by ${technician.user.name} or the QC lead`)
      expect((await person.delete(open.path(`/views/${view.id}`))).status).toBe(403)
    }
    expect((await lead.patch(open.path(`/views/${view.id}`), { name: 'By the lead' })).status).toBe(200)
    expect((await lead.delete(open.path(`/views/${view.id}`))).status).toBe(204)
  })

  it('that is shared no more is nobody’s but its author’s, and nobody else’s first', async () => {
    const view = await save(technician, { shared: true })
    await superintendent.put(open.path('/views/default'), { viewId: view.id })
    await technician.put(open.path('/views/default'), { viewId: view.id })
    expect((await technician.patch(open.path(`/views/${view.id}`), { shared: false })).body).toMatchObject({ isDefault: true })
    expect(await viewsOf(superintendent)).toEqual([])
    expect((await superintendent.put(open.path('/views/default'), { viewId: view.id })).status).toBe(404)
    expect(await rowsOf(app.dataSource.manager, 'default_view', open.siteId)).toHaveLength(1)
  })

  it('is told to everybody who has the site open', async () => {
    const socket = app.connect(superintendent)
    const heard = new Promise<ServerEvent>((resolve) => socket.on('site:changed', resolve))
    await new Promise((resolve) => socket.emit('site:join', open.siteId, resolve))
    const view = await save(technician, { shared: true })
    expect(await heard).toMatchObject({ resource: 'view', id: view.id })
  })
})

describe('views of one’s own', () => {
  it('are not there for anybody else, the lead included', async () => {
    const view = await save(technician)
    for (const person of [lead, superintendent]) {
      expect(await namesOf(person)).toEqual([])
      expect((await person.patch(open.path(`/views/${view.id}`), { name: 'Found' })).status).toBe(404)
      expect((await person.delete(open.path(`/views/${view.id}`))).status).toBe(404)
      expect((await person.put(open.path('/views/default'), { viewId: view.id })).status).toBe(404)
    }
    expect(await namesOf(technician)).toEqual(['Failures'])
  })

  it('do not cross sites, even for one person who belongs to both', async () => {
    const view = await save(technician, { shared: true })
    await buildMembership(app.dataSource.manager, { role: 'technician', siteId: other.siteId, userId: technician.user.id })
    for (const person of [technician, other.people['qc-lead']]) {
      expect(await viewsOf(person, other)).toEqual([])
      expect((await person.patch(other.path(`/views/${view.id}`), { name: 'Found' })).status).toBe(404)
      expect((await person.delete(other.path(`/views/${view.id}`))).status).toBe(404)
      expect((await person.put(other.path('/views/default'), { viewId: view.id })).status).toBe(404)
    }
    expect(await namesOf(technician)).toEqual(['Failures'])
  })
})

describe('the view that the register opens with', () => {
  it('is one a person, chosen and left again', async () => {
    const own = await save(technician, { name: 'Own' })
    const shared = await save(lead, { name: 'Shared', shared: true })
    const chosen = async (person: SignedIn) => (await viewsOf(person)).filter((view) => view.isDefault).map((view) => view.name)
    await technician.put(open.path('/views/default'), { viewId: own.id })
    await technician.put(open.path('/views/default'), { viewId: shared.id })
    expect(await chosen(technician)).toEqual(['Shared'])
    expect(await chosen(lead)).toEqual([])
    const left = await technician.put(open.path('/views/default'), { viewId: null })
    expect(left.status).toBe(200)
    expect(await chosen(technician)).toEqual([])
    expect((await technician.put(open.path('/views/default'), { viewId: 'nothing' })).status).toBe(400)
    expect((await technician.put(open.path('/views/default'), { viewId: randomUUID() })).status).toBe(404)
  })
})
