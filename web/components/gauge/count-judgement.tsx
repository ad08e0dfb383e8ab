import { checkStability, DRIFT_LIMITS, judgeCount, type CountPair } from '#shared/domain/standard-count.ts'
import type { CountReferenceView } from '#shared/schemas/gauge.ts'
import { driftText, referenceWords } from './gauge-words.ts'
import { GaugeState } from './gauge-state.tsx'

const isCount = (value: number): boolean => Number.isFinite(value) && value > 0

function Drift({ name, percent, good, limit }: { name: string; percent: number; good: boolean; limit: number }) {
  return (
    <li className="flex items-baseline justify-between gap-3 border-t border-rule py-[6px]">
      <span>
        {name}, within ±{limit}
        {'\u2009'}%
      </span>
      <span className="flex items-baseline gap-3">
        <span className="num">{driftText(percent)}</span>
        <GaugeState state={good ? 'good' : 'count-bad'} words={good ? 'Good' : 'Out'} className="w-16" />
      </span>
    </li>
  )
}

/** What a count comes to while it is typed, and against what. */
export function CountJudgement({ count, reference, reading }: { count: CountPair; reference: CountReferenceView | null; reading: boolean }) {
  if (reading) return <p className="m-0 text-ink-2">The reference of that day is on its way.</p>
  const typed = isCount(count.density) && isCount(count.moisture)
  const judged = reference !== null && typed ? judgeCount(count, reference) : null
  return (
    <div role="status" aria-label="Judgement" className="bg-film px-3 pt-[9px] pb-[7px]">
      <p className="m-0 text-small text-ink-2">{reference === null ? '' : 'It is '}{referenceWords(reference)}</p>
      {judged !== null && (
        <>
          <ul className="m-0 mt-2 list-none p-0">
            <Drift name="Density" percent={judged.densityPercent} good={judged.densityGood} limit={DRIFT_LIMITS.density} />
            <Drift name="Moisture" percent={judged.moisturePercent} good={judged.moistureGood} limit={DRIFT_LIMITS.moisture} />
          </ul>
          {!judged.good && <p className="m-0 mt-1 font-medium text-bad">Save it, then count again: block dry and on the ground, nothing within reach. If it stays out, take the gauge out of service.</p>}
        </>
      )}
    </div>
  )
}

/** What five counts come to. */
export function StabilityWords({ five }: { five: readonly CountPair[] }) {
  const stability = checkStability(five)
  if (!stability.ok) return null
  return (
    <p role="status" className="m-0 mt-2">
      <GaugeState state={stability.stable ? 'good' : 'count-bad'} words={stability.stable ? 'Stable' : 'Not stable'} /> Density ranges over {stability.densityPercent.toFixed(2)}
      {'\u2009'}% (below {DRIFT_LIMITS.density}), moisture over {stability.moisturePercent.toFixed(2)}
      {'\u2009'}% (below {DRIFT_LIMITS.moisture}).
    </p>
  )
}
