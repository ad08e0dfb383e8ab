import type { ReactNode } from 'react'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import type { SheetRow } from './sheet-rows.ts'

/** A ruled part of the saved sheet. */
export function SheetSection({ title, aside, children }: { title: string; aside?: ReactNode; children: ReactNode }) {
  return (
    <section className="mb-[22px] break-inside-avoid">
      <SectionHead aside={aside}>{title}</SectionHead>
      {children}
    </section>
  )
}

/** Labels and what was recorded, two to a line where there is room. */
export function RowList({ rows }: { rows: readonly (Omit<SheetRow, 'value'> & { readonly value: ReactNode })[] }) {
  return (
    <dl className="m-0 grid gap-x-[22px] sm:grid-cols-2">
      {rows.map(({ label, value }) => (
        <div key={label} className="flex items-baseline justify-between gap-3 border-b border-rule py-[6px]">
          <dt className="text-ink-2">{label}</dt>
          <dd className="num m-0 text-right">{value}</dd>
        </div>
      ))}
    </dl>
  )
}
