import { useId } from 'react'

type DoneStepperProps = {
  label: string
  unit: string
  value: string
  onChange: (text: string) => void
  /** what one tap adds or takes */
  step: number
  error?: string | undefined
}

const KEY = 'grid size-14 shrink-0 place-items-center rounded-ctl border-[1.5px] border-rule-2 text-[26px] leading-none font-bold'

/** A figure to set with gloves on: large keys at both sides, the figure between them can also be typed. */
export function DoneStepper({ label, unit, value, onChange, step, error }: DoneStepperProps) {
  const id = useId()
  const move = (by: number) => {
    const now = Number(value.replaceAll(',', ''))
    onChange(String(Math.max(0, (Number.isFinite(now) ? now : 0) + by)))
  }
  return (
    <div className="border-t border-rule pt-3 pb-[10px]">
      <label htmlFor={id} className="block text-[16px] font-semibold">
        {label}
      </label>
      <div className="mt-2 flex items-center gap-2">
        <button type="button" className={KEY} aria-label={`${label}: ${step} ${unit} less`} onClick={() => move(-step)}>
          −
        </button>
        <span className="frame-focus flex min-h-14 min-w-0 flex-1 items-center rounded-ctl border-[1.5px] border-rule-2 bg-raised">
          <input
            id={id}
            inputMode="decimal"
            autoComplete="off"
            value={value}
            onChange={(event) => onChange(event.target.value)}
            aria-invalid={error === undefined ? undefined : true}
            aria-describedby={`${id}-unit${error === undefined ? '' : ` ${id}-error`}`}
            className="num w-full min-w-0 bg-transparent px-3 pt-1 text-right text-[22px] text-ink"
          />
          <span id={`${id}-unit`} className="shrink-0 pr-3 pt-1 text-[16px] text-ink-2">
            {unit}
          </span>
        </span>
        <button type="button" className={KEY} aria-label={`${label}: ${step} ${unit} more`} onClick={() => move(step)}>
          +
        </button>
      </div>
      {error !== undefined && (
        <p id={`${id}-error`} role="alert" className="m-0 mt-2 text-[14px] font-medium text-bad">
          {error}
        </p>
      )}
    </div>
  )
}
