import { TYPICAL_GRAVITIES, type TypicalGravity } from '#shared/domain/typical-gravity.ts'

const rangeWords = ({ low, high }: TypicalGravity): string => (low === high ? low.toFixed(2) : `${low.toFixed(2)} to ${high.toFixed(2)}`)

/** Specific gravities to compare with, by soil and mineral, with where they are from. Nothing is filled in. */
export function TypicalGravities() {
  return (
    <details>
      <summary className="w-fit cursor-pointer py-[2px] text-small font-semibold pointer-coarse:min-h-11 pointer-coarse:py-3">Typical specific gravities</summary>
      {TYPICAL_GRAVITIES.map(({ title, source, rows }) => (
        <section key={title} className="mt-2">
          <h4 className="m-0 text-small font-semibold">
            {title} <span className="font-medium text-ink-2">from {source}</span>
          </h4>
          <dl className="m-0 mt-1 gap-x-8 text-small [columns:220px]">
            {rows.map((row) => (
              <div key={row.name} className="flex break-inside-avoid justify-between gap-4 border-b border-rule py-[3px]">
                <dt>{row.name}</dt>
                <dd className="num m-0 whitespace-nowrap">{rangeWords(row)}</dd>
              </div>
            ))}
          </dl>
        </section>
      ))}
    </details>
  )
}
