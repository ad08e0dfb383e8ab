import type { ReactNode } from 'react'

/** The usual caution beside an act that can hurt someone: short, and deferring to the site's own plan. */
export function Caution({ title, children }: { title: string; children: ReactNode }) {
  return (
    <aside aria-label={`Caution: ${title}`} className="border border-ink px-[14px] pt-3 pb-[10px] text-[13px] leading-[1.45]">
      <b className="mb-[2px] block font-bold">{title}</b>
      {children}
    </aside>
  )
}
