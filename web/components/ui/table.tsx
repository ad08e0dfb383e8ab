import type { ComponentProps, ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'

type TableProps = {
  /** Names the register; said to those who cannot see it. */
  caption: string
  children: ReactNode
  className?: string
}

/** A register. Wider than its place, it scrolls by itself and can be reached by keyboard. */
export function Table({ caption, children, className }: TableProps) {
  return (
    <div role="region" aria-label={caption} tabIndex={0} className={classNames('relative max-w-full overflow-x-auto -outline-offset-3', className)}>
      <table className="w-full border-collapse bg-raised text-ink">
        <caption className="sr-only">{caption}</caption>
        {children}
      </table>
    </div>
  )
}

type CellProps = { numeric?: boolean }

export function HeadCell({ numeric = false, className, ...rest }: ComponentProps<'th'> & CellProps) {
  return (
    <th
      scope="col"
      {...rest}
      className={classNames('border-b border-ink px-2 py-2 text-[12px] font-semibold whitespace-nowrap text-ink-2', numeric ? 'text-right' : 'text-left', className)}
    />
  )
}

export function Row({ selected = false, className, ...rest }: ComponentProps<'tr'> & { selected?: boolean }) {
  return <tr {...rest} aria-selected={selected || undefined} className={classNames(selected && 'bg-film', className)} />
}

/** What the row is about. */
export function RowHead({ className, ...rest }: ComponentProps<'th'>) {
  return <th scope="row" {...rest} className={classNames('border-b border-rule px-2 pt-[9px] pb-[7px] text-left font-semibold whitespace-nowrap', className)} />
}

/** A cell; figures stand at the right, in the figures' own face. */
export function Cell({ numeric = false, className, ...rest }: ComponentProps<'td'> & CellProps) {
  return <td {...rest} className={classNames('border-b border-rule px-2 pt-[9px] pb-[7px]', numeric && 'num text-right whitespace-nowrap', className)} />
}
