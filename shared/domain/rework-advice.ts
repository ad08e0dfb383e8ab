import type { ReasonCode } from './verdict-types.ts'

/** What a rework order says is wrong, each with its own way to put it right. */
export type ReworkAction = 'too-loose' | 'too-dense' | 'too-dry' | 'too-wet' | 'other'

const ACTION: Readonly<Record<ReasonCode, ReworkAction>> = {
  'too-loose': 'too-loose',
  'too-dense': 'too-dense',
  'too-dry': 'too-dry',
  'too-wet': 'too-wet',
  'saturation-low': 'too-dry',
  'saturation-high': 'too-wet',
  'air-voids-high': 'too-loose',
}

/** The fault and its remedy in plain words, in the order the work is done: water first, then the roller. */
const WORDS: readonly { readonly code: ReasonCode; readonly fault: string; readonly remedy: string }[] = [
  { code: 'too-dry', fault: 'too dry', remedy: 'add water' },
  { code: 'saturation-low', fault: 'too little water', remedy: 'add water' },
  { code: 'too-wet', fault: 'too wet', remedy: 'dry it back' },
  { code: 'saturation-high', fault: 'too much water', remedy: 'dry it back' },
  { code: 'too-loose', fault: 'too loose', remedy: 'roll again' },
  { code: 'air-voids-high', fault: 'too much air', remedy: 'roll again' },
  { code: 'too-dense', fault: 'too dense', remedy: 'loosen it and roll lighter' },
]

/**
 * What a rework order for an unmet verdict is about.
 * @param reasons unmet limits of the verdict
 * @returns each action once; `other` where no limit names one
 */
export function reworkActions(reasons: readonly { readonly code: ReasonCode }[]): ReworkAction[] {
  const actions = new Set(reasons.map(({ code }) => ACTION[code]))
  return actions.size > 0 ? [...actions] : ['other']
}

/**
 * The order in a line that an operator can act on: "Too dry. Add water."
 * @param reasons unmet limits of the verdict
 */
export function reworkHeadline(reasons: readonly { readonly code: ReasonCode }[]): string {
  const unmet = WORDS.filter(({ code }) => reasons.some((reason) => reason.code === code))
  if (unmet.length === 0) return 'Does not meet specification. Ask the QC lead what to do.'
  const faults = unmet.map(({ fault }) => fault)
  const remedies = [...new Set(unmet.map(({ remedy }) => remedy))]
  return `${sentence(faults, ' and ')} ${sentence(remedies, ', then ')}`
}

function sentence(parts: readonly string[], last: string): string {
  const text = parts.length > 1 ? `${parts.slice(0, -1).join(', ')}${last}${parts.at(-1)}` : (parts[0] ?? '')
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`
}
