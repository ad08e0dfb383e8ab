import { useEffect, useRef, type FormEvent, type ReactNode } from 'react'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button, type ButtonProps } from '#web/components/ui/button.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { isApiError } from '#web/lib/api-error.ts'

/** A change on its way; paused while there is no signal. */
export type Act = { readonly error: Error | null; readonly isPending: boolean; readonly isPaused: boolean }

type TaskFrameProps = {
  title: string
  /** the save as it stands; what the server says against it is shown, everything typed is kept */
  act: Act
  /** "Save placement" */
  saveLabel: string
  saveKind?: ButtonProps['kind']
  canSave: boolean
  onSave: () => void
  /** acts beside saving */
  more?: ReactNode
  children: ReactNode
}

/** A task in the panel: its words, its fields, what went wrong, and the way out. */
export function TaskFrame({ title, act, saveLabel, saveKind = 'primary', canSave, onSave, more, children }: TaskFrameProps) {
  const { end } = useGroundView()
  const { error, isPending, isPaused } = act
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => {
    heading.current?.focus()
  }, [title])
  const handleSubmit = (event: FormEvent): void => {
    event.preventDefault()
    if (canSave && !isPending) onSave()
  }
  return (
    <form aria-labelledby="task-heading" onSubmit={handleSubmit} noValidate className="flex flex-1 flex-col">
      <div className="flex-1 px-[22px] py-[18px]">
        <h2 id="task-heading" ref={heading} tabIndex={-1} className="m-0 mb-3 text-question font-extrabold">
          {title}
        </h2>
        <div className="grid gap-4">{children}</div>
      </div>
      {isPaused && (
        <Banner tone="off" title="No signal." className="mx-[22px] mb-3">
          It is sent as soon as the signal is back, while this page stays open.
        </Banner>
      )}
      {error !== null && (
        <Banner tone="bad" title={isApiError(error) ? error.message : 'Something went wrong on this page.'} className="mx-[22px] mb-3">
          {isApiError(error) && error.code === 'unreachable' ? 'What you entered is kept here. Save again when it does.' : 'What you entered is kept.'}
        </Banner>
      )}
      <div className="sticky bottom-0 flex flex-wrap gap-2 border-t border-rule bg-raised px-[22px] py-3">
        <Button type="submit" kind={saveKind} disabled={!canSave} busyLabel={isPending && (isPaused ? 'Waiting for signal' : 'Saving')} className="pointer-coarse:min-h-12">
          {saveLabel}
        </Button>
        {more}
        <Button kind="quiet" onClick={end} className="pointer-coarse:min-h-12">
          Cancel
        </Button>
      </div>
    </form>
  )
}
