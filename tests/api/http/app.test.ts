import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { siteFeatures } from '#api/features/index.ts'
import { buildSite } from '#tests/factories/site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp

beforeAll(async () => {
  app = await testApp({ WEB_ROOT: 'tests/fixtures/web-client' })
})

afterAll(() => app.end())

type Method = 'get' | 'post' | 'put' | 'patch' | 'delete'

function routesOfSites(): { method: Method; path: string }[] {
  return siteFeatures.flatMap((routes) =>
    routes(app.deps).stack.flatMap(({ route }) => {
      if (!route) return []
      const { path, stack } = route as unknown as { path: string; stack: { method: Method }[] }
      return [...new Set(stack.map(({ method }) => method))].map((method) => ({ method, path }))
    }),
  )
}

describe('every route of a site', () => {
  it('answers a stranger 404, as if the site did not exist', async () => {
    const site = await buildSite(app.dataSource.manager)
    const stranger = await app.signedIn()
    const routes = routesOfSites()
    expect(routes.length).toBeGreaterThanOrEqual(4)
    for (const { method, path } of routes) {
      const there = await stranger[method](`/api/sites/${site.id}${path.replaceAll(/:\w+/g, site.id)}`)
      const nowhere = await stranger[method](`/api/sites/${stranger.user.id}${path.replaceAll(/:\w+/g, site.id)}`)
      const { requestId: _there, ...answer } = there.body as Record<string, unknown>
      const { requestId: _nowhere, ...answerNowhere } = nowhere.body as Record<string, unknown>
      expect([method, path, there.status, answer.code]).toEqual([method, path, 404, 'not_found'])
      expect([nowhere.status, answerNowhere]).toEqual([404, answer])
    }
  })

  it('answers 401 to somebody who is not signed in', async () => {
    const site = await buildSite(app.dataSource.manager)
    const visitor = app.visitor()
    for (const { method, path } of routesOfSites()) {
      const answer = await visitor[method](`/api/sites/${site.id}${path.replaceAll(/:\w+/g, site.id)}`)
      expect([method, path, answer.status]).toEqual([method, path, 401])
    }
  })

  it('answers 404 to an id that is none', async () => {
    const person = await app.signedIn()
    expect((await person.get('/api/sites/%00%27/members')).status).toBe(404)
  })
})

describe('the answers’ headers', () => {
  it('let no other origin’s code, frames or connections in', async () => {
    const { headers } = await request(app.url).get('/')
    const policy = String(headers['content-security-policy'])
    const host = new URL(app.url).host
    expect(policy.split(';').sort()).toEqual(
      [
        "default-src 'self'",
        "script-src 'self'",
        "script-src-attr 'none'",
        "style-src 'self' 'unsafe-inline'",
        "img-src 'self' data: blob:",
        "font-src 'self'",
        `connect-src 'self' ws://${host} wss://${host}`,
        "worker-src 'self' blob:",
        "object-src 'none'",
        "base-uri 'none'",
        "form-action 'self'",
        "frame-ancestors 'none'",
      ].sort(),
    )
    expect(headers['x-content-type-options']).toBe('nosniff')
    expect(headers['x-frame-options']).toBe('DENY')
    expect(headers).not.toHaveProperty('x-powered-by')
  })

  it('name the request, as the error’s body does', async () => {
    const answer = await app.visitor().get('/api/nothing-here')
    expect(answer.status).toBe(404)
    expect((answer.body as { requestId: string }).requestId).toBe(answer.headers['x-request-id'])
  })
})

describe('a request that cannot be taken in', () => {
  it('of a megabyte is answered 413 in plain words', async () => {
    const person = await app.signedIn()
    const answer = await person.post('/api/session', { email: 'x'.repeat(1_000_000), password: 'x' })
    expect(answer.status).toBe(413)
    const { code, message } = answer.body as { code: string; message: string }
    expect(code).toBe('too_large')
    expect(message).toMatch(/nothing was saved/)
  })

  it('with broken JSON is answered 400 in plain words', async () => {
    const answer = await request(app.url).post('/api/session').set('Content-Type', 'application/json').send('{"email":')
    expect(answer.status).toBe(400)
    expect((answer.body as { code: string }).code).toBe('invalid')
  })

  it('with a malformed address is answered 400, not 500', async () => {
    const person = await app.signedIn()
    expect((await person.get('/api/sites/%E0%A4%A/members')).status).toBe(400)
  })
})

describe('GET /api/health', () => {
  it('answers for the program and its database', async () => {
    const answer = await request(app.url).get('/api/health')
    expect([answer.status, answer.body]).toEqual([200, { ok: true, app: 'hardpan' }])
  })
})

describe('the client', () => {
  it('is cached for good where the name carries a hash, and asked for anew otherwise', async () => {
    const asset = await request(app.url).get('/assets/board-1a2b3c.js')
    expect(asset.headers['cache-control']).toBe('public, max-age=31536000, immutable')
    const page = await request(app.url).get('/')
    expect(page.headers['cache-control']).toBe('no-cache')
  })

  it('answers its page for every address that is not the API’s, and 404 for a missing file', async () => {
    const page = await request(app.url).get('/sites/any/ground').set('Accept', 'text/html')
    expect([page.status, page.type]).toEqual([200, 'text/html'])
    expect((await request(app.url).get('/assets/gone.js')).status).toBe(404)
    expect((await request(app.url).get('/api/gone')).type).toBe('application/json')
  })
})
