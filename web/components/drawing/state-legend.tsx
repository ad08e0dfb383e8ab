import type { GroundState } from '#shared/domain/ground-state.ts'
import { OVERLAY_LOOKS, stateLook } from '#shared/look/ground-look.ts'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { classNames } from '#web/lib/class-names.ts'

type StateLegendProps = {
  states: readonly GroundState[]
  /** Adds the lines of "near a limit", an overlay. */
  near?: boolean
  className?: string
}

/** The states on a drawing and their words. */
export function StateLegend({ states, near = false, className }: StateLegendProps) {
  return (
    <ul aria-label="Legend" className={classNames('m-0 flex list-none flex-wrap gap-x-[18px] gap-y-2 border border-rule-2 bg-sheet px-3 pt-[10px] pb-[9px] text-[12px] font-medium text-ink', className)}>
      {states.map((state) => (
        <li key={state} className="flex items-center gap-[7px] whitespace-nowrap">
          <StateSwatch state={state} size={17} />
          {stateLook(state).word}
        </li>
      ))}
      {near && (
        <li className="flex items-center gap-[7px] whitespace-nowrap">
          <StateSwatch state="meets-spec" near size={17} />
          {OVERLAY_LOOKS.near.word}
        </li>
      )}
    </ul>
  )
}
