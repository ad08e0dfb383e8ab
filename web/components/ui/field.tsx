import { useId, type ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'

/** What a control inside a field must carry, so that its words belong to it. */
export type ControlProps = { id: string; 'aria-describedby': string | undefined; 'aria-invalid': true | undefined }

export type FieldWords = {
  label: string
  /** Said at the right inside the frame: a unit, or what a choice comes to. */
  unit?: ReactNode
  hint?: ReactNode
  /** Cannot be saved like this. */
  error?: string | undefined
  /** May be saved, flagged. */
  warning?: string | undefined
}

type FieldProps = FieldWords & {
  calculated?: boolean
  className?: string | undefined
  children: (control: ControlProps) => ReactNode
}

function edgeOf({ error, warning, calculated }: { error?: string | undefined; warning?: string | undefined; calculated: boolean }): string {
  if (error !== undefined) return 'border-bad'
  if (warning !== undefined) return 'border-warn'
  return calculated ? 'border-rule-2 border-dashed' : 'border-rule-2'
}

/** A labelled frame with its unit at the right and, beneath, what is wrong or worth knowing. */
export function Field({ label, unit, hint, error, warning, calculated = false, className, children }: FieldProps) {
  const id = useId()
  const wordsId = `${id}-words`
  const unitId = `${id}-unit`
  const words = error ?? warning ?? hint
  const described = classNames(unit !== undefined && unitId, words !== undefined && wordsId)
  return (
    <div className={classNames('min-w-0', className)}>
      <label htmlFor={id} className="block text-small font-medium text-ink-2">
        {label}
      </label>
      <div
        className={classNames(
          'frame-focus mt-1 flex items-center rounded-ctl border-[1.5px] text-ink min-h-[38px] pointer-coarse:min-h-12',
          calculated ? 'bg-film' : 'bg-raised',
          edgeOf({ error, warning, calculated }),
        )}
      >
        {children({ id, 'aria-describedby': described === '' ? undefined : described, 'aria-invalid': error === undefined ? undefined : true })}
        {unit !== undefined && (
          <span id={unitId} className="shrink-0 pr-[10px] text-small font-medium text-ink-2">
            {unit}
          </span>
        )}
      </div>
      {words !== undefined && (
        <p
          id={wordsId}
          role={error === undefined ? undefined : 'alert'}
          className={classNames(
            'mt-2 mb-0 text-small font-medium',
            error !== undefined ? 'text-bad' : warning !== undefined ? 'text-warn' : 'text-ink-2',
          )}
        >
          {words}
        </p>
      )}
    </div>
  )
}
