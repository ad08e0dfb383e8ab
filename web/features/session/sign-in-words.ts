import { isApiError } from '#web/lib/api-error.ts'

/** Why signing in failed, in plain words, and what to do. */
export function signInFailure(error: Error): string {
  if (!isApiError(error)) return 'Something went wrong on this page. Load it again and sign in once more.'
  if (error.status === 401) return 'That e-mail address and password do not belong together. Check both; capitals count in the password.'
  if (error.status === 429) return 'Too many tries from here. Wait a few minutes, then try again. Your account is not locked.'
  if (error.status === 400) return 'The server could not read that. Check the e-mail address.'
  if (error.code === 'unreachable') return 'The server does not answer. What you typed is still here; try again in a moment.'
  return `The server could not sign you in just now. Try again in a moment.${error.requestId === undefined ? '' : ` (Request ${error.requestId})`}`
}

/** Where to go on to: only an address of this site, whatever the link said. */
export function nextPage(wish: string | null): string {
  return wish !== null && /^\/(?![/\\])/.test(wish) ? wish : '/'
}
