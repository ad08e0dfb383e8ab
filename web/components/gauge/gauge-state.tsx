import type { TestGauge } from '#shared/schemas/gauge.ts'
import { classNames } from '#web/lib/class-names.ts'

type State = TestGauge['state']

const TONES: Readonly<Record<State, string>> = {
  good: 'text-good',
  'not-counted': 'text-warn',
  'count-bad': 'text-bad',
  'out-of-service': 'text-bad',
  overdue: 'text-bad',
  'not-calibrated': 'text-bad',
  'not-named': 'text-warn',
}

/** Told apart by shape too: a full dot is good, a ring waits for its count, a cross is out of limits, a barred square is not to be used. */
function StateMark({ state }: { state: State }) {
  return (
    <svg aria-hidden width="12" height="12" viewBox="0 0 12 12" className="shrink-0 self-center" fill="none" stroke="currentColor" strokeWidth="2">
      {state === 'good' && <circle cx="6" cy="6" r="5" fill="currentColor" stroke="none" />}
      {(state === 'not-counted' || state === 'not-named') && <circle cx="6" cy="6" r="4.5" />}
      {state === 'count-bad' && <path d="M1.5 1.5l9 9m0 -9l-9 9" />}
      {(state === 'out-of-service' || state === 'overdue' || state === 'not-calibrated') && <path d="M1.5 1.5h9v9h-9zM1.5 10.5l9 -9" />}
    </svg>
  )
}

/** How a gauge stands, mark and words. */
export function GaugeState({ state, words, className }: { state: State; words: string; className?: string }) {
  return (
    <span className={classNames('inline-flex items-baseline gap-[7px] font-semibold', TONES[state], className)}>
      <StateMark state={state} />
      <span>{words}</span>
    </span>
  )
}
