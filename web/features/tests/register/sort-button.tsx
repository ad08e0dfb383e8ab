import type { ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'

type SortButtonProps = { sorted: false | 'asc' | 'desc'; numeric: boolean; onSort: () => void; children: ReactNode }

/** The head of a column, pressed to sort by it and again to turn the order; the arrow says which way it stands. */
export function SortButton({ sorted, numeric, onSort, children }: SortButtonProps) {
  return (
    <button type="button" onClick={onSort} className={classNames('-my-2 inline-flex min-h-9 align-middle items-center gap-[5px] -outline-offset-3 font-semibold whitespace-nowrap hover:text-ink', numeric && 'flex-row-reverse', sorted === false ? 'text-ink-2' : 'text-ink')}>
      {children}
      <svg aria-hidden width="7" height="9" viewBox="0 0 7 9" className={classNames('shrink-0', sorted === false && 'invisible')}>
        <path d={sorted === 'desc' ? 'M3.5 1v7M1 5.5L3.5 8 6 5.5' : 'M3.5 8V1M1 3.5L3.5 1 6 3.5'} fill="none" stroke="currentColor" strokeWidth="1.5" />
      </svg>
    </button>
  )
}
