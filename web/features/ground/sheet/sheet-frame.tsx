import { lazy, Suspense } from 'react'
import { Banner } from '#web/components/ui/banner.tsx'
import { ErrorBoundary } from '#web/components/ui/error-boundary.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { classNames } from '#web/lib/class-names.ts'
import type { GroundView as LiveGround } from '#web/lib/ground-store.ts'
import { isApiError } from '#web/lib/api-error.ts'
import { ListView } from '#web/features/ground/list/list-view.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'

// the drawing library is large, and the list needs none of it
const GroundSheetMap = lazy(async () => ({ default: (await import('./ground-sheet.tsx')).GroundSheetMap }))

function SheetOnItsWay() {
  return (
    <div className="h-full bg-sheet p-[46px]">
      <Skeleton label="The sheet is on its way" lines={[82, 90, 90, 74, 86, 60]} />
    </div>
  )
}

function ViewSwitch({ list, onChange }: { list: boolean; onChange: (list: boolean) => void }) {
  return (
    <button
      type="button"
      aria-pressed={list}
      onClick={() => onChange(!list)}
      className={classNames(
        'min-h-8 border border-ink bg-sheet px-3 pt-[6px] pb-1 text-[12px] font-bold text-ink hover:bg-film pointer-coarse:min-h-12',
        list ? 'ml-auto block' : 'absolute top-[42px] right-3 z-10',
      )}
    >
      {list ? 'Map' : 'List'}
    </button>
  )
}

/** The sheet itself: the map, or the list that says the same. */
export function SheetFrame({ ground, showing }: { ground: LiveGround; showing: string }) {
  const { address, go } = useGroundView()
  const { sheet, error } = ground
  const setList = (list: boolean): void => go({ list })
  if (sheet === undefined && error !== null) {
    return (
      <Banner tone="bad" title={isApiError(error) ? error.message : 'The sheet cannot be read.'} className="m-[22px]">
        Nothing is lost. It is asked for again by itself.
      </Banner>
    )
  }
  if (address.list) {
    return (
      <div className="flex h-full min-h-0 flex-col bg-sheet">
        <div className="px-4 pt-3 sm:px-[22px]">
          <ViewSwitch list onChange={setList} />
        </div>
        <div className="min-h-0 flex-1">{sheet === undefined ? <SheetOnItsWay /> : <ListView sheet={sheet} showing={showing} />}</div>
      </div>
    )
  }
  return (
    <>
      <ErrorBoundary what="The map">
        <Suspense fallback={<SheetOnItsWay />}>
          <GroundSheetMap ground={ground} label={`Ground, ${showing}`} />
        </Suspense>
      </ErrorBoundary>
      <ViewSwitch list={false} onChange={setList} />
    </>
  )
}
