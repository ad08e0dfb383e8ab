import type { ComponentProps } from 'react'
import { buttonClasses, type ButtonKind, type ButtonSize } from './button-classes.ts'

export type ButtonProps = ComponentProps<'button'> & {
  kind?: ButtonKind
  size?: ButtonSize
  /** Said instead of the label while the act is on its way; the button cannot be pressed again. */
  busyLabel?: string | false
}

export function Button({ kind = 'plain', size = 'regular', busyLabel = false, disabled, className, children, ...rest }: ButtonProps) {
  const busy = busyLabel !== false
  return (
    <button
      type="button"
      {...rest}
      disabled={disabled === true || busy}
      aria-busy={busy || undefined}
      className={buttonClasses(kind, size, className)}
    >
      {busy ? busyLabel : children}
    </button>
  )
}
