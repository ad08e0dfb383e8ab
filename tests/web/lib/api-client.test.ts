import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { apiBytes, apiJson, apiVoid, keepCsrfToken } from '#web/lib/api-client.ts'
import { ApiError } from '#web/lib/api-error.ts'

const thing = z.object({ name: z.string() })
const csrfError = () => HttpResponse.json({ code: 'csrf', message: 'The token has run out.', requestId: 'r-1' }, { status: 403 })

function serveMe(...tokens: string[]): void {
  apiStandIn.use(http.get('/api/me', () => HttpResponse.json({ user: null, csrfToken: tokens.shift() ?? 'none-left' })))
}

async function failureOf(promise: Promise<unknown>): Promise<ApiError> {
  const error = await promise.then(() => null, (reason: unknown) => reason)
  if (error instanceof ApiError) return error
  throw new Error('The call did not fail with an ApiError')
}

beforeEach(() => keepCsrfToken(null))

describe('asking the API', () => {
  it('reads an answer with its schema and writes the query', async () => {
    apiStandIn.use(http.get('/api/things', ({ request }) => HttpResponse.json({ name: new URL(request.url).search })))
    expect(await apiJson('/api/things', thing, { query: { lift: 10, zone: undefined, open: true } })).toEqual({ name: '?lift=10&open=true' })
  })

  it('refuses an answer that is not what the schema promises', async () => {
    apiStandIn.use(http.get('/api/things', () => HttpResponse.json({ title: 'no name' })))
    expect(await failureOf(apiJson('/api/things', thing))).toMatchObject({ status: 200, code: 'unreadable' })
  })

  it('throws the API’s own code, words, details and request', async () => {
    apiStandIn.use(http.get('/api/things', () => HttpResponse.json({ code: 'not_found', message: 'No such thing.', details: { id: 7 }, requestId: 'r-9' }, { status: 404 })))
    expect(await failureOf(apiJson('/api/things', thing))).toMatchObject({ status: 404, code: 'not_found', message: 'No such thing.', details: { id: 7 }, requestId: 'r-9' })
  })

  it('says that nothing was changed when no answer comes', async () => {
    apiStandIn.use(http.get('/api/things', () => HttpResponse.error()))
    const error = await failureOf(apiJson('/api/things', thing))
    expect(error).toMatchObject({ status: 0, code: 'unreachable' })
  })

  it('hands over bytes as they are', async () => {
    apiStandIn.use(http.get('/api/ground', () => HttpResponse.arrayBuffer(new Uint8Array([1, 2, 3]).buffer)))
    expect([...new Uint8Array(await apiBytes('/api/ground'))]).toEqual([1, 2, 3])
  })
})

describe('changing something', () => {
  it('fetches a token first and sends it with every change, but only once', async () => {
    const seen: (string | null)[] = []
    serveMe('one', 'two')
    apiStandIn.use(http.post('/api/things', ({ request }) => {
      seen.push(request.headers.get('x-csrf-token'))
      return HttpResponse.json({ name: 'saved' })
    }))
    await apiJson('/api/things', thing, { method: 'POST', body: {} })
    await apiJson('/api/things', thing, { method: 'POST', body: {} })
    expect(seen).toEqual(['one', 'one'])
  })

  it('fetches a fresh token and sends again once when the token has run out', async () => {
    const seen: (string | null)[] = []
    serveMe('fresh')
    keepCsrfToken('stale')
    apiStandIn.use(http.delete('/api/session', ({ request }) => {
      seen.push(request.headers.get('x-csrf-token'))
      return request.headers.get('x-csrf-token') === 'fresh' ? new HttpResponse(null, { status: 204 }) : csrfError()
    }))
    await apiVoid('/api/session', { method: 'DELETE' })
    expect(seen).toEqual(['stale', 'fresh'])
  })

  it('gives up after the second refusal', async () => {
    let tries = 0
    serveMe('fresh', 'fresher')
    keepCsrfToken('stale')
    apiStandIn.use(http.post('/api/things', () => {
      tries += 1
      return csrfError()
    }))
    expect(await failureOf(apiJson('/api/things', thing, { method: 'POST', body: {} }))).toMatchObject({ status: 403, code: 'csrf', requestId: 'r-1' })
    expect(tries).toBe(2)
  })

  it('does not send again for a refusal of another kind', async () => {
    let tries = 0
    keepCsrfToken('good')
    apiStandIn.use(http.post('/api/things', () => {
      tries += 1
      return HttpResponse.json({ code: 'forbidden', message: 'Only the QC lead may do that.' }, { status: 403 })
    }))
    expect(await failureOf(apiJson('/api/things', thing, { method: 'POST', body: {} }))).toMatchObject({ code: 'forbidden' })
    expect(tries).toBe(1)
  })
})
