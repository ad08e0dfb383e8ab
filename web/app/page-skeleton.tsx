import { Wordmark } from '#web/components/ui/wordmark.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'

/** The sheet on its way: its header and rules stand, its lines are still dashes. */
export function PageSkeleton() {
  return (
    <div className="flex min-h-dvh flex-col">
      <div className="flex h-14 items-center border-b-2 border-ink bg-raised px-5">
        <Wordmark />
      </div>
      <div className="flex flex-1">
        <div className="flex-1 bg-sheet px-[26px] py-[22px]">
          <Skeleton label="The page is on its way" lines={[32, 64, 58, 61, 40]} />
        </div>
        <div className="hidden w-96 border-l border-rule-2 bg-raised px-[22px] py-[18px] lg:block" aria-hidden>
          <Skeleton label="" />
        </div>
      </div>
    </div>
  )
}
