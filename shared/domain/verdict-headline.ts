import type { Criterion } from '#shared/domain/limits.ts'
import type { Outcome, ReasonCode, VerdictReason } from '#shared/domain/verdict-types.ts'

/**
 * The verdict in a line that a person on the ground can act on: "Too dry, dense enough".
 * @param reasons unmet limits; criteria those asked for
 */
export function headlineOf(
  outcome: Outcome,
  reasons: readonly VerdictReason[],
  criteria: readonly Criterion[],
  near: boolean,
  treatedAsFail: boolean,
): string {
  if (outcome === 'suspect') {
    return treatedAsFail ? "Result can't be right, and it is below the density limit" : "Result can't be right, run it again"
  }
  if (outcome === 'pass') return near ? 'Meets spec, near a limit' : 'Meets spec'

  const has = (code: ReasonCode) => reasons.some((reason) => reason.code === code)
  const density = has('too-loose') ? 'too loose' : has('too-dense') ? 'too dense' : null
  const moisture = has('too-dry') ? 'too dry' : has('too-wet') ? 'too wet' : null
  const air = has('air-voids-high') ? 'too much air' : null
  const water = has('saturation-low') ? 'saturation too low' : has('saturation-high') ? 'saturation too high' : null
  const asks = (...kinds: Criterion['kind'][]) => criteria.some((criterion) => kinds.includes(criterion.kind))

  const unmet = [density, moisture, air, water].filter((part) => part !== null)
  const words = unmet.length > 1 ? `${unmet.slice(0, -1).join(', ')} and ${unmet.at(-1)}` : (unmet[0] ?? '')
  if (unmet.length === 1 && moisture && asks('rc-min', 'rc-min-steps', 'dry-density-min')) return capital(`${words}, dense enough`)
  if (unmet.length === 1 && density && asks('moisture-band')) return capital(`${words}, moisture in range`)
  return capital(words)
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
