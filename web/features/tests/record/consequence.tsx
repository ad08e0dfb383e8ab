import type { Verdict } from '#shared/domain/verdict-types.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { consequences } from './consequence-words.ts'
import type { Previewed } from './use-preview.ts'

type ConsequenceProps = { previewed: Previewed; verdict: Verdict | null; purpose: Purpose | ''; lift: number | null }

const WORDS = {
  none: 'What saving does to the ground is said here once place, purpose and curve are chosen.',
  asking: 'Looking up what saving does to the ground.',
  offline: 'Offline: what saving does to the ground cannot be known now.',
  failed: 'What saving does to the ground cannot be told just now.',
} as const

/** The words of `Consequence`, one string. */
export function useConsequenceWords({ previewed, verdict, purpose, lift }: ConsequenceProps): string {
  const site = useSite()
  if (previewed.state !== 'known') return WORDS[previewed.state]
  if (purpose === '' || lift === null) return WORDS.none
  return consequences(previewed.preview, { outcome: verdict?.outcome ?? null, purpose, lift }, site).join(' ')
}
