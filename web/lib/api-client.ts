import type { ZodType } from 'zod'
import { meResponseSchema } from '#shared/schemas/session.ts'
import { ApiError, errorBodySchema } from './api-error.ts'

type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'
/** Several values of one name travel joined by commas. */
type Query = Readonly<Record<string, string | number | boolean | readonly string[] | null | undefined>>

export type ApiRequest = {
  readonly method?: Method
  readonly query?: Query
  readonly body?: unknown
  readonly signal?: AbortSignal
}

export const CSRF_HEADER = 'x-csrf-token'
let csrfToken: string | null = null

/** Keeps the token of the session; null after signing in or out, since the session is a new one. */
export function keepCsrfToken(token: string | null): void {
  csrfToken = token
}

function addressOf(path: string, query: Query | undefined): string {
  const search = new URLSearchParams()
  for (const [name, value] of Object.entries(query ?? {})) {
    if (value !== undefined && value !== null) search.set(name, String(value))
  }
  const text = search.toString()
  return text === '' ? path : `${path}?${text}`
}

async function send(path: string, { method = 'GET', query, body, signal }: ApiRequest): Promise<Response> {
  const headers = new Headers({ accept: 'application/json' })
  if (body !== undefined) headers.set('content-type', 'application/json')
  if (method !== 'GET') headers.set(CSRF_HEADER, csrfToken ?? (await fetchCsrfToken(signal)))
  try {
    return await fetch(addressOf(path, query), {
      method,
      headers,
      credentials: 'same-origin',
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      ...(signal === undefined ? {} : { signal }),
    })
  } catch (error) {
    if (signal?.aborted === true) throw error
    throw new ApiError({ status: 0, code: 'unreachable', message: 'The server does not answer. Nothing was changed.' })
  }
}

/** What an answer that is no success says. */
export async function errorOf(response: Response): Promise<ApiError> {
  const parsed = errorBodySchema.safeParse(await response.json().catch(() => null))
  if (parsed.success) return new ApiError({ status: response.status, ...parsed.data })
  return new ApiError({ status: response.status, code: 'unreadable', message: `The server answered ${response.status} and gave no reason.` })
}

/** An answer's content by its schema. Throws ApiError. */
export async function readJson<T>(response: Response, schema: ZodType<T>): Promise<T> {
  const parsed = schema.safeParse(await response.json().catch(() => undefined))
  if (parsed.success) return parsed.data
  throw new ApiError({
    status: response.status,
    code: 'unreadable',
    message: 'The server’s answer is not what this page expects. Reload the page to get the current version.',
    details: parsed.error.issues,
  })
}

async function fetchCsrfToken(signal?: AbortSignal): Promise<string> {
  const response = await send('/api/me', signal === undefined ? {} : { signal })
  if (!response.ok) throw await errorOf(response)
  const { csrfToken: token } = await readJson(response, meResponseSchema)
  csrfToken = token
  return token
}

/** The session's token, for uploads, which do not go through fetch; `fresh` once the one at hand has run out. */
export async function csrfTokenOf({ fresh = false } = {}): Promise<string> {
  return fresh || csrfToken === null ? fetchCsrfToken() : csrfToken
}

/** Sends, and once more with a fresh token where the token had run out. */
async function request(path: string, options: ApiRequest): Promise<Response> {
  const response = await send(path, options)
  if (response.ok) return response
  const error = await errorOf(response)
  if (error.status !== 403 || error.code !== 'csrf') throw error
  await fetchCsrfToken(options.signal)
  const second = await send(path, options)
  if (!second.ok) throw await errorOf(second)
  return second
}

/** Asks the API and reads the answer with its schema. Throws ApiError. */
export async function apiJson<T>(path: string, schema: ZodType<T>, options: ApiRequest = {}): Promise<T> {
  return readJson(await request(path, options), schema)
}

/** Asks for something that has no answer but its success (204). Throws ApiError. */
export async function apiVoid(path: string, options: ApiRequest): Promise<void> {
  await request(path, options)
}

/** Asks for a binary answer, such as the Ground's columns. Throws ApiError. */
export async function apiBytes(path: string, options: ApiRequest = {}): Promise<ArrayBuffer> {
  return (await request(path, options)).arrayBuffer()
}
