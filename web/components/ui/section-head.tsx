import type { ReactNode } from 'react'

/** A heading over an ink rule, with its source or count at the right. */
export function SectionHead({ children, aside, level = 2 }: { children: ReactNode; aside?: ReactNode; level?: 2 | 3 }) {
  const Heading = level === 2 ? 'h2' : 'h3'
  return (
    <div className="mb-[10px] flex flex-wrap items-baseline justify-between gap-x-3 border-b border-ink pb-[5px]">
      <Heading className="m-0 text-head font-bold">{children}</Heading>
      {aside !== undefined && <span className="text-small font-medium text-ink-2">{aside}</span>}
    </div>
  )
}
