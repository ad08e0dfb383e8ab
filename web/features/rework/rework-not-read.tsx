import { Banner } from '#web/components/ui/banner.tsx'
import { isApiError } from '#web/lib/api-error.ts'

/** The orders could not be read: why, and the way to try again. */
export function ReworkNotRead({ error, retry }: { error: Error; retry: () => void }) {
  return (
    <Banner
      tone="bad"
      title={isApiError(error) ? error.message : 'The orders could not be read.'}
      action={
        <button type="button" onClick={retry}>
          Try again
        </button>
      }
    >
      Nothing is lost.
    </Banner>
  )
}
