import { useId } from 'react'
import { classNames } from '#web/lib/class-names.ts'

export type SegmentedOption<T extends string> = { readonly value: T; readonly label: string; readonly disabled?: boolean }

type SegmentedProps<T extends string> = {
  /** What is being chosen, for those who cannot see it. */
  label: string
  options: readonly SegmentedOption<T>[]
  value: T
  onChange: (value: T) => void
  /** Stretch over the width, as at the top of a form. */
  wide?: boolean
  size?: 'regular' | 'touch'
}

/** One choice out of a few, all in sight. Arrow keys move it, as in any radio group. */
export function Segmented<T extends string>({ label, options, value, onChange, wide = false, size = 'regular' }: SegmentedProps<T>) {
  const name = useId()
  return (
    <div
      role="radiogroup"
      aria-label={label}
      className={classNames('border-[1.5px] border-ink rounded-ctl bg-raised max-w-full', wide ? 'flex max-sm:flex-wrap' : 'inline-flex max-sm:flex-wrap')}
    >
      {options.map((option, index) => (
        <label
          key={option.value}
          className={classNames(
            'grid place-items-center text-center text-[13.5px] leading-[1.3] font-semibold px-[14px] has-focus-visible:outline-3 has-focus-visible:outline-ink has-focus-visible:outline-offset-3 has-focus-visible:z-10 relative has-disabled:opacity-40',
            size === 'touch' ? 'min-h-12' : 'min-h-8 pt-[7px] pb-[5px]',
            wide && 'grow shrink-0 basis-0 max-sm:basis-2/5',
            index > 0 && 'border-l border-rule-2',
            option.value === value ? 'bg-ink text-raised' : 'text-ink hover:bg-film',
          )}
        >
          <input
            type="radio"
            className="sr-only"
            name={name}
            value={option.value}
            checked={option.value === value}
            disabled={option.disabled}
            onChange={() => onChange(option.value)}
          />
          {option.label}
        </label>
      ))}
    </div>
  )
}
