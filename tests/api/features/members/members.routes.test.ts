import { randomUUID } from 'node:crypto'
import type { Response } from 'supertest'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { eventListSchema } from '#shared/schemas/event.ts'
import { memberListSchema } from '#shared/schemas/member.ts'
import { buildSite } from '#tests/factories/site.ts'
import { buildUser } from '#tests/factories/user.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

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

const path = (userId = '') => `/api/sites/${siteId}/members${userId && `/${userId}`}`

async function newcomer(): Promise<string> {
  return (await buildUser(app.dataSource.manager)).email
}

function rolesIn(answer: Response): string[] {
  return memberListSchema
    .parse(answer.body)
    .members.map(({ role }) => role)
    .sort()
}

describe('GET /members', () => {
  it('shows everybody to every member', async () => {
    const operator = await app.signedIn('operator', siteId)
    const answer = await operator.get(path())
    expect(answer.status).toBe(200)
    expect(rolesIn(answer)).toEqual(['operator', 'qc-lead'])
  })
})

describe('POST /members', () => {
  it('by the lead gives somebody with an account a role, which then counts', async () => {
    const person = await app.signedIn()
    expect((await person.get(path())).status).toBe(404)
    const answer = await lead.post(path(), { email: person.user.email.toUpperCase(), role: 'technician' })
    expect([answer.status, rolesIn(answer)]).toEqual([200, ['qc-lead', 'technician']])
    expect((await person.get(path())).status).toBe(200)
  })

  it('gives a member another role, and writes both into the audit trail', async () => {
    const email = await newcomer()
    await lead.post(path(), { email, role: 'technician' })
    await lead.post(path(), { email, role: 'superintendent' })
    const { events } = eventListSchema.parse((await lead.get(`/api/sites/${siteId}/events?subjectType=member`)).body)
    expect(events.map(({ verb, payload }) => [verb, payload.role ?? payload.to])).toEqual([
      ['member.role-changed', 'superintendent'],
      ['member.added', 'technician'],
    ])
  })

  it('says plainly that nobody has the address', async () => {
    const answer = await lead.post(path(), { email: 'nobody@example.test', role: 'operator' })
    expect(answer.status).toBe(400)
    expect(answer.body).toMatchObject({ code: 'invalid', details: { issues: [{ path: 'body.email' }] } })
  })

  it('refuses a role that is none, 400, and everybody but lead and owner’s representative, 403', async () => {
    expect((await lead.post(path(), { email: await newcomer(), role: 'king' })).status).toBe(400)
    for (const role of ['technician', 'superintendent', 'operator'] as const) {
      const person = await app.signedIn(role, siteId)
      expect((await person.post(path(), { email: await newcomer(), role: 'operator' })).status).toBe(403)
    }
  })

  it('lets the lead name the first owner’s representative, and only these the following ones', async () => {
    const first = await app.signedIn()
    expect((await lead.post(path(), { email: first.user.email, role: 'owner-rep' })).status).toBe(200)
    expect((await lead.post(path(), { email: await newcomer(), role: 'owner-rep' })).status).toBe(403)
    expect((await first.post(path(), { email: await newcomer(), role: 'owner-rep' })).status).toBe(200)
    expect((await first.post(path(), { email: await newcomer(), role: 'technician' })).status).toBe(403)
  })

  it('does not let the lead turn an owner’s representative into somebody else', async () => {
    const owner = await app.signedIn('owner-rep', siteId)
    expect((await lead.post(path(), { email: owner.user.email, role: 'operator' })).status).toBe(403)
    expect((await lead.delete(path(owner.user.id))).status).toBe(403)
  })

  it('keeps at least one lead on a site', async () => {
    const answer = await lead.post(path(), { email: lead.user.email, role: 'technician' })
    expect([answer.status, (answer.body as { code: string }).code]).toEqual([409, 'conflict'])
    expect((await lead.delete(path(lead.user.id))).status).toBe(409)
  })
})

describe('DELETE /members/:userId', () => {
  it('takes the membership away: from then on the site is not there', async () => {
    const technician = await app.signedIn('technician', siteId)
    expect((await lead.delete(path(technician.user.id))).status).toBe(204)
    expect((await technician.get(path())).status).toBe(404)
  })

  it('answers 404 for somebody who is no member', async () => {
    expect((await lead.delete(path(randomUUID()))).status).toBe(404)
  })
})

describe('GET /events', () => {
  it('gives pages, newest first, that join without a gap', async () => {
    for (const role of ['technician', 'operator', 'superintendent']) await lead.post(path(), { email: await newcomer(), role })
    const first = eventListSchema.parse((await lead.get(`/api/sites/${siteId}/events?limit=2`)).body)
    expect([first.events.map(({ seq }) => seq), first.next]).toEqual([[3, 2], 2])
    const second = eventListSchema.parse((await lead.get(`/api/sites/${siteId}/events?limit=2&before=2`)).body)
    expect([second.events.map(({ seq }) => seq), second.next]).toEqual([[1], null])
    expect(first.events[0]?.actor).toEqual({ id: lead.user.id, name: lead.user.name })
  })

  it('is not for operators, and answers 400 to a page size beyond the limit', async () => {
    const operator = await app.signedIn('operator', siteId)
    expect((await operator.get(`/api/sites/${siteId}/events`)).status).toBe(403)
    expect((await lead.get(`/api/sites/${siteId}/events?limit=5000`)).status).toBe(400)
  })
})
