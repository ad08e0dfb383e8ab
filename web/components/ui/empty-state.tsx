import type { ReactNode } from 'react'

/** Nothing here yet: says so, and what to do first. */
export function EmptyState({ title, children, action }: { title: string; children: ReactNode; action?: ReactNode }) {
  return (
    <div className="border border-dashed border-rule-2 px-[22px] py-6 text-ink-2">
      <b className="mb-1 block text-[16px] font-bold text-ink">{title}</b>
      <div>{children}</div>
      {action !== undefined && <div className="mt-[14px] flex flex-wrap gap-2">{action}</div>}
    </div>
  )
}
