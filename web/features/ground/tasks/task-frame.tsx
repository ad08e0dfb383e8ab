import { useEffect, useRef, type FormEvent, type ReactNode } from 'react'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button, type ButtonProps } from '#web/components/ui/button.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { isApiError } from '#web/lib/api-error.ts'

type TaskFrameProps = {
  title: string
  /** what the server said against it; everything typed is kept */
  error: Error | null
  saving: boolean
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
export function TaskFrame({ title, error, saving, saveLabel, saveKind = 'primary', canSave, onSave, more, children }: TaskFrameProps) {
  const { end } = useGroundView()
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => {
    heading.current?.focus()
  }, [title])
  const handleSubmit = (event: FormEvent): void => {
    event.preventDefault()
    if (canSave && !saving) onSave()
  }
  return (
    <form aria-labelledby="task-heading" onSubmit={handleSubmit} noValidate className="flex flex-1 flex-col">
      <div className="flex-1 px-[22px] py-[18px]">
        <h2 id="task-heading" ref={heading} tabIndex={-1} className="m-0 mb-3 text-question font-extrabold">
          {title}
        </h2>
        <div className="grid gap-4">{children}</div>
      </div>
      {error !== null && (
        <Banner tone="bad" title={isApiError(error) ? error.message : 'Something went wrong on this page.'} className="mx-[22px] mb-3">
          {isApiError(error) && error.code === 'unreachable' ? 'What you entered is kept here. Save again when it does.' : 'What you entered is kept.'}
        </Banner>
      )}
      <div className="sticky bottom-0 flex flex-wrap gap-2 border-t border-rule bg-raised px-[22px] py-3">
        <Button type="submit" kind={saveKind} disabled={!canSave} busyLabel={saving && 'Saving'} className="pointer-coarse:min-h-12">
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
