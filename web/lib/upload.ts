import type { ZodType } from 'zod'
import { CSRF_HEADER, csrfTokenOf, errorOf, readJson } from './api-client.ts'
import { ApiError, isApiError } from './api-error.ts'

type UploadOptions = {
  /** Share of the bytes that have left, 0 to 1. */
  readonly onProgress?: (share: number) => void
  readonly signal?: AbortSignal
}

/** Answers that carry no body, whatever XMLHttpRequest makes of it. */
const EMPTY: readonly number[] = [204, 205, 304]

/** XMLHttpRequest, because fetch does not tell how much of a request has been sent. */
function send(path: string, form: FormData, token: string, { onProgress, signal }: UploadOptions): Promise<Response> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest()
    const abort = (): void => request.abort()
    request.open('POST', path)
    request.setRequestHeader('accept', 'application/json')
    request.setRequestHeader(CSRF_HEADER, token)
    request.upload.onprogress = ({ loaded, total }) => onProgress?.(total > 0 ? loaded / total : 0)
    request.onload = () => resolve(new Response(EMPTY.includes(request.status) ? null : request.responseText, { status: request.status }))
    request.onerror = () => reject(new ApiError({ status: 0, code: 'unreachable', message: 'The server does not answer. The file is kept here; try again when there is a signal.' }))
    request.onabort = () => reject(new DOMException('The upload was broken off', 'AbortError'))
    request.onloadend = () => signal?.removeEventListener('abort', abort)
    signal?.addEventListener('abort', abort)
    if (signal?.aborted === true) abort()
    else request.send(form)
  })
}

/** Sends a form with a file and tells how far it is; once more with a fresh token where the token had run out. Throws ApiError. */
export async function apiUpload<T>(path: string, schema: ZodType<T>, form: FormData, options: UploadOptions = {}): Promise<T> {
  const response = await send(path, form, await csrfTokenOf(), options)
  if (response.ok) return readJson(response, schema)
  const error = await errorOf(response)
  if (!isApiError(error) || error.code !== 'csrf') throw error
  const second = await send(path, form, await csrfTokenOf({ fresh: true }), options)
  if (!second.ok) throw await errorOf(second)
  return readJson(second, schema)
}
