import { quarterCount } from '#shared/domain/placement-volume.ts'
import { classNames } from '#web/lib/class-names.ts'

const QUARTERS = [
  { bit: 1, word: 'upper left' },
  { bit: 2, word: 'upper right' },
  { bit: 4, word: 'lower left' },
  { bit: 8, word: 'lower right' },
] as const

/** The quarters of one cell that the fill covers; the last one stays. */
export function QuartersField({ label, value, onChange }: { label: string; value: number; onChange: (quarters: number) => void }) {
  return (
    <fieldset className="m-0 flex items-center gap-3 border-0 p-0">
      <legend className="float-left mr-3 p-0 text-small font-medium text-ink-2">Quarters of {label}</legend>
      <div className="grid grid-cols-2 border-[1.5px] border-ink">
        {QUARTERS.map(({ bit, word }) => {
          const on = (value & bit) !== 0
          return (
            <label
              key={bit}
              className={classNames(
                'relative grid size-8 place-items-center border-[0.5px] border-rule-2 pointer-coarse:size-12 has-focus-visible:z-10 has-focus-visible:outline-3 has-focus-visible:outline-ink',
                on ? 'bg-ink' : 'bg-raised',
              )}
            >
              <input
                type="checkbox"
                className="sr-only"
                aria-label={word}
                checked={on}
                onChange={() => {
                  const next = value ^ bit
                  if (next !== 0) onChange(next)
                }}
              />
            </label>
          )
        })}
      </div>
      <span className="text-small text-ink-2">{quarterCount(value) === 4 ? 'the whole cell' : `${quarterCount(value)} of 4`}</span>
    </fieldset>
  )
}
