import type { ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'

/** A thin space between a value and its unit. */
export const THIN_SPACE = '\u2009'

/** One large figure and what it is of: "3,410 cy, 92 cells, about 213 loads". */
export function Figure({ value, unit, of }: { value: string; unit: string; of: ReactNode }) {
  return (
    <p className="m-0 mt-2 mb-[2px] flex flex-wrap items-baseline gap-x-[10px]">
      <span className="text-figure font-light tracking-[-0.03em] whitespace-nowrap">
        {value}
        {'\u00a0'}
        {unit}
      </span>
      <span className="font-medium text-ink-2">{of}</span>
    </p>
  )
}

export type Fact = { readonly label: string; readonly value: string; readonly unit?: string; readonly tone?: 'bad' | 'good' | undefined }

/** Figures side by side between rules, as in the title block and under a plot. */
export function FactsRow({ facts, columns, className }: { facts: readonly Fact[]; /** as many as fit by default */ columns?: number; className?: string }) {
  return (
    <dl
      className={classNames('m-0 grid overflow-hidden border-y border-rule-2', className)}
      style={{ gridTemplateColumns: columns !== undefined ? `repeat(${columns}, minmax(0, 1fr))` : `repeat(auto-fit, minmax(min(100%, ${facts.length > 3 ? 96 : 120}px), 1fr))` }}
    >
      {facts.map(({ label, value, unit, tone }) => (
        <div key={label} className="-ml-px border-l border-rule px-3 pt-[10px] pb-2">
          <dt className="cap whitespace-nowrap">{label}</dt>
          <dd
            className={classNames(
              'm-0 mt-1 text-value font-semibold whitespace-nowrap',
              tone === 'bad' && 'text-bad',
              tone === 'good' && 'text-good',
            )}
          >
            {value}
            {unit !== undefined && (
              <small className="ml-[3px] text-[12px] font-medium text-ink-2">
                {THIN_SPACE}
                {unit}
              </small>
            )}
          </dd>
        </div>
      ))}
    </dl>
  )
}
