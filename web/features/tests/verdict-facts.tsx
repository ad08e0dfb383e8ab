import { FactsRow } from '#web/components/ui/figure.tsx'
import { NO_VALUE } from '#shared/units/format.ts'
import type { Units } from '#web/lib/units.ts'

type Facts = { readonly dryDensity: number; readonly rc: number; readonly moisture: number; readonly saturation: number | null; readonly reasons: readonly { readonly code: string }[] }

const missed = (facts: Facts, ...codes: string[]): 'bad' | undefined => (facts.reasons.some((reason) => codes.includes(reason.code)) ? 'bad' : undefined)

/** The four figures of a result, under its plot; dashes until there is one. */
export function VerdictFacts({ facts, units }: { facts: Facts | null; units: Units }) {
  return (
    <FactsRow
      className="grid-cols-2! sm:max-lg:grid-cols-4! xl:grid-cols-4! print:grid-cols-2!"
      facts={[
        { label: 'Dry unit wt', value: facts ? units.densityNumber(facts.dryDensity) : NO_VALUE, unit: units.marks.density, tone: facts ? missed(facts, 'too-loose', 'too-dense') : undefined },
        { label: 'Compaction', value: facts ? units.number(facts.rc, 1) : NO_VALUE, unit: '%', tone: facts ? missed(facts, 'too-loose', 'too-dense') : undefined },
        { label: 'Moisture', value: facts ? units.number(facts.moisture, 1) : NO_VALUE, unit: '%', tone: facts ? missed(facts, 'too-dry', 'too-wet') : undefined },
        { label: 'Saturation', value: facts === null || facts.saturation === null ? NO_VALUE : units.number(facts.saturation, 0), unit: '%', tone: facts ? missed(facts, 'saturation-low', 'saturation-high') : undefined },
      ]}
    />
  )
}
