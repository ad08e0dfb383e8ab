import type { ComponentProps, ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'
import { Field, type FieldWords } from './field.tsx'

const CONTROL = 'w-full min-w-0 grow bg-transparent border-0 px-[10px] pt-[9px] pb-[7px] text-entry text-ink placeholder:text-ink-3'

type InputProps = Omit<ComponentProps<'input'>, 'className'> & FieldWords & { className?: string }

function fieldWords<T extends FieldWords>({ label, unit, hint, error, warning, ...rest }: T) {
  return { words: { label, unit, hint, error, warning }, rest }
}

export function TextField({ className, ...props }: InputProps) {
  const { words, rest } = fieldWords(props)
  return (
    <Field {...words} className={className}>
      {(control) => <input type="text" {...rest} {...control} className={CONTROL} />}
    </Field>
  )
}

/** A figure as it was read. The text is kept as typed, so that 95 and 95.0 stay different. */
export function NumberField({ className, ...props }: InputProps) {
  const { words, rest } = fieldWords(props)
  return (
    <Field {...words} className={className}>
      {(control) => (
        <input type="text" inputMode="decimal" autoComplete="off" {...rest} {...control} className={classNames(CONTROL, 'num')} />
      )}
    </Field>
  )
}

type CellsFieldProps = InputProps & {
  /** What the text comes to: "10 cells, 618 cy". */
  comesTo?: ReactNode
}

/** Cells typed as a range: `G11:I13, K12`. */
export function CellsField({ className, comesTo, ...props }: CellsFieldProps) {
  const { words, rest } = fieldWords(props)
  return (
    <Field {...words} unit={comesTo} className={className}>
      {(control) => (
        <input
          type="text"
          autoCapitalize="characters"
          autoComplete="off"
          spellCheck={false}
          {...rest}
          {...control}
          className={classNames(CONTROL, 'num')}
        />
      )}
    </Field>
  )
}

type SelectFieldProps = Omit<ComponentProps<'select'>, 'className'> & FieldWords & { className?: string }

export function SelectField({ className, children, ...props }: SelectFieldProps) {
  const { words, rest } = fieldWords(props)
  return (
    <Field {...words} className={className}>
      {(control) => (
        <span className="relative flex w-full min-w-0">
          <select {...rest} {...control} className={classNames(CONTROL, 'appearance-none pr-8 [&>option]:bg-raised')}>
            {children}
          </select>
          <svg aria-hidden width="12" height="8" viewBox="0 0 12 8" className="pointer-events-none absolute right-[11px] top-1/2 -translate-y-1/2">
            <path d="M1 1.5l5 5 5-5" fill="none" stroke="currentColor" strokeWidth="1.6" />
          </svg>
        </span>
      )}
    </Field>
  )
}

type TextAreaProps = Omit<ComponentProps<'textarea'>, 'className'> & FieldWords & { className?: string }

export function TextArea({ className, rows = 3, ...props }: TextAreaProps) {
  const { words, rest } = fieldWords(props)
  return (
    <Field {...words} className={className}>
      {(control) => <textarea rows={rows} {...rest} {...control} className={classNames(CONTROL, 'resize-y')} />}
    </Field>
  )
}

type CalculatedFieldProps = Omit<FieldWords, 'error'> & { value: string | null; className?: string }

/** A figure the sheet works out: dashed, film-coloured, not to be typed in. `null` until it can be worked out. */
export function CalculatedField({ value, className, ...words }: CalculatedFieldProps) {
  return (
    <Field {...words} calculated className={className}>
      {({ id, 'aria-describedby': describedBy }) => (
        <output id={id} aria-describedby={describedBy} className={classNames(CONTROL, 'num block', value === null && 'text-ink-3')}>
          {value ?? 'not yet'}
        </output>
      )}
    </Field>
  )
}
