import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { SIGN_IN_LIMITS } from '#api/http/rate-limit.ts'
import { meResponseSchema } from '#shared/schemas/session.ts'
import { PASSWORD, buildUser } from '#tests/factories/user.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp

beforeAll(async () => {
  app = await testApp()
})

afterAll(() => app.end())

function sessionIdOf(cookie: string): string {
  return decodeURIComponent(cookie.split('=')[1] ?? '').slice(2).split('.')[0] ?? ''
}

describe('GET /api/me', () => {
  it('answers 200 with nobody and a token when signed out', async () => {
    const answer = await app.visitor().get('/api/me')
    expect(answer.status).toBe(200)
    const me = meResponseSchema.parse(answer.body)
    expect(me.user).toBeNull()
    expect(me.csrfToken.length).toBeGreaterThan(20)
    expect(answer.headers['cache-control']).toBe('no-store')
  })

  it('tells who is signed in', async () => {
    const person = await app.signedIn()
    const { body } = await person.get('/api/me')
    expect(meResponseSchema.parse(body).user).toEqual({ id: person.user.id, name: person.user.name, email: person.user.email })
  })
})

describe('POST /api/session', () => {
  it('signs in, whatever the case of the e-mail address', async () => {
    const { email } = await buildUser(app.dataSource.manager)
    const answer = await app.visitor().signIn(` ${email.toUpperCase()} `)
    expect(answer.status).toBe(200)
    expect((answer.body as { user: { email: string } }).user.email).toBe(email)
  })

  it('keeps the cookie from scripts and from other sites', async () => {
    const { email } = await buildUser(app.dataSource.manager)
    const answer = await app.visitor().signIn(email)
    const cookie = String(answer.headers['set-cookie'])
    expect(cookie).toMatch(/HttpOnly/)
    expect(cookie).toMatch(/SameSite=Lax/)
  })

  it('answers a wrong password and an unknown address alike', async () => {
    const { email } = await buildUser(app.dataSource.manager)
    const wrong = await app.visitor().signIn(email, 'not the password')
    const unknown = await app.visitor().signIn('nobody-at-all@example.test', 'not the password')
    expect(wrong.status).toBe(401)
    expect(unknown.status).toBe(401)
    const { requestId: _one, ...wrongBody } = wrong.body as Record<string, unknown>
    const { requestId: _two, ...unknownBody } = unknown.body as Record<string, unknown>
    expect(unknownBody).toEqual(wrongBody)
    expect(wrongBody.code).toBe('not_signed_in')
  })

  it('takes as long for an unknown address as for a wrong password', async () => {
    const users = await Promise.all(Array.from({ length: 7 }, () => buildUser(app.dataSource.manager)))
    const visitor = app.visitor()
    await visitor.signIn('first@example.test', 'x')
    const timed = async (email: string) => {
      const start = performance.now()
      await visitor.signIn(email, 'not the password')
      return performance.now() - start
    }
    const wrong: number[] = []
    const unknown: number[] = []
    for (const [i, user] of users.entries()) {
      wrong.push(await timed(user.email))
      unknown.push(await timed(`nobody-${i}@example.test`))
    }
    const median = (values: number[]) => [...values].sort((a, b) => a - b)[3] ?? 0
    // Without the hash the answer comes in a small part of the time; scheduling noise stays well inside this.
    expect(median(unknown)).toBeGreaterThan(median(wrong) * 0.5)
    expect(median(unknown)).toBeLessThan(median(wrong) * 2)
  })

  it('says everything that is wrong with the form at once', async () => {
    const answer = await app.visitor().post('/api/session', { email: 'no at sign', password: '' })
    expect(answer.status).toBe(400)
    const { code, details } = answer.body as { code: string; details: { issues: { path: string }[] } }
    expect(code).toBe('invalid')
    expect(details.issues.map(({ path }) => path)).toEqual(['body.email', 'body.password'])
  })

  it('refuses more wrong passwords than the limit, and a right one with them', async () => {
    const { email } = await buildUser(app.dataSource.manager)
    const visitor = app.visitor()
    for (let i = 0; i < SIGN_IN_LIMITS.perAccount; i++) expect((await visitor.signIn(email, 'guess')).status).toBe(401)
    const answer = await visitor.signIn(email)
    expect(answer.status).toBe(429)
    expect((answer.body as { code: string }).code).toBe('too_many_requests')
    const other = await buildUser(app.dataSource.manager)
    expect((await visitor.signIn(other.email)).status).toBe(200)
  })

  it('gives the session another id, so that a planted one is worth nothing', async () => {
    const { email } = await buildUser(app.dataSource.manager)
    const visitor = app.visitor()
    const planted = await visitor.get('/api/me')
    const before = String(planted.headers['set-cookie']).split(';')[0] ?? ''
    await visitor.signIn(email)
    expect(sessionIdOf(visitor.cookie())).not.toBe(sessionIdOf(before))
    const { body } = await request(app.url).get('/api/me').set('Cookie', before)
    expect(meResponseSchema.parse(body).user).toBeNull()
  })
})

describe('DELETE /api/session', () => {
  it('ends the session on the server, not only in the browser', async () => {
    const person = await app.signedIn()
    const cookie = person.cookie()
    expect((await person.delete('/api/session')).status).toBe(204)
    const { body } = await request(app.url).get('/api/me').set('Cookie', cookie)
    expect(meResponseSchema.parse(body).user).toBeNull()
  })
})

describe('the token of the session', () => {
  it('is asked of every change: without it 403, code csrf', async () => {
    const { email } = await buildUser(app.dataSource.manager)
    const answer = await request(app.url).post('/api/session').send({ email, password: PASSWORD })
    expect(answer.status).toBe(403)
    expect((answer.body as { code: string }).code).toBe('csrf')
  })

  it('of another session is refused', async () => {
    const theirs = await app.visitor().get('/api/me')
    const agent = request.agent(app.url)
    await agent.get('/api/me')
    const answer = await agent
      .post('/api/session')
      .set('x-csrf-token', (theirs.body as { csrfToken: string }).csrfToken)
      .send({ email: 'a@b.test', password: 'x' })
    expect((answer.body as { code: string }).code).toBe('csrf')
  })

  it('from before the sign-in no longer counts after it', async () => {
    const { email } = await buildUser(app.dataSource.manager)
    const agent = request.agent(app.url)
    const { csrfToken } = meResponseSchema.parse((await agent.get('/api/me')).body)
    await agent.post('/api/session').set('x-csrf-token', csrfToken).send({ email, password: PASSWORD })
    const answer = await agent.delete('/api/session').set('x-csrf-token', csrfToken)
    expect(answer.status).toBe(403)
  })
})
