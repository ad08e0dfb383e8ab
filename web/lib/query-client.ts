import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query'
import { toast } from 'sonner'
import { isApiError } from './api-error.ts'

declare module '@tanstack/react-query' {
  interface Register {
    mutationMeta: {
      /** The page says itself what went wrong, beside the field or the button. */
      saysOwnErrors?: boolean
    }
  }
}

function sayFailure(error: Error): void {
  const words = isApiError(error) ? error.message : 'Something went wrong on this page. Nothing was saved.'
  const request = isApiError(error) && error.requestId !== undefined ? `Request ${error.requestId}` : undefined
  toast.error(words, request === undefined ? {} : { description: request })
}

/** Answers that a second try will not change. */
function isFinal(error: Error): boolean {
  return isApiError(error) && (error.code === 'unreadable' || (error.status >= 400 && error.status < 500))
}

/** @param onSignedOut called when the API says that nobody is signed in any more. */
export function createQueryClient({ onSignedOut }: { onSignedOut?: () => void } = {}): QueryClient {
  const noticeSignedOut = (error: Error): void => {
    if (isApiError(error) && error.status === 401 && error.code === 'not_signed_in') onSignedOut?.()
  }
  return new QueryClient({
    queryCache: new QueryCache({ onError: noticeSignedOut }),
    mutationCache: new MutationCache({
      onError: (error, _variables, _result, mutation) => {
        noticeSignedOut(error)
        if (mutation.meta?.saysOwnErrors !== true) sayFailure(error)
      },
    }),
    defaultOptions: {
      queries: { staleTime: 30_000, retry: (failures, error) => !isFinal(error) && failures < 2 },
      mutations: { retry: false },
    },
  })
}
