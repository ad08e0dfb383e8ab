import type { FieldMethod, MoistureMethod } from '#shared/domain/field-sheets.ts'
import type { WallConvention, WallOffset } from '#shared/domain/wall-offset.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'

/** How each choice is written in a file; read back whatever its capitals, by its own name too. */
export const METHOD_WORDS: Readonly<Record<FieldMethod, string>> = { 'sand-cone': 'Sand cone', 'rubber-balloon': 'Rubber balloon', 'drive-cylinder': 'Drive cylinder', 'nuclear-gauge': 'Nuclear gauge', plain: 'Plain' }
export const PURPOSE_WORDS: Readonly<Record<Purpose, string>> = { required: 'Required', judgement: 'Judgement', verification: 'Verification', referee: 'Referee' }
export const FOLLOW_WORDS: Readonly<Record<'retest' | 'rerun', string>> = { retest: 'Retest', rerun: 'Re-run' }
export const MOISTURE_WORDS: Readonly<Record<MoistureMethod, string>> = { oven: 'Oven', microwave: 'Microwave', carbide: 'Carbide', gauge: 'Gauge', stated: 'Stated' }
export const MODE_WORDS: Readonly<Record<'direct-transmission' | 'backscatter', string>> = { 'direct-transmission': 'Direct transmission', backscatter: 'Backscatter' }
export const VOLUME_BY_WORDS: Readonly<Record<'stated' | 'measured', string>> = { stated: 'Stated', measured: 'Measured' }
export const APPLIED_WORDS: Readonly<Record<WallOffset['appliedBy'], string>> = { gauge: 'Gauge', here: 'Here' }
export const CONVENTION_WORDS: Readonly<Record<WallConvention, string>> = { 'block-minus-standard': 'Block minus standard', 'standard-minus-block': 'Standard minus block' }
export const CONFIRMED = 'Yes'

/** Other words that are common for a choice, small letters and digits only. */
const OTHER_WORDS: Readonly<Record<string, string>> = {
  sandreplacement: 'sand-cone', d1556: 'sand-cone', astmd1556: 'sand-cone',
  balloon: 'rubber-balloon', d2167: 'rubber-balloon', astmd2167: 'rubber-balloon',
  cylinder: 'drive-cylinder', drivetube: 'drive-cylinder', d2937: 'drive-cylinder', astmd2937: 'drive-cylinder',
  nuclear: 'nuclear-gauge', gauge: 'nuclear-gauge', ndg: 'nuclear-gauge', d6938: 'nuclear-gauge', astmd6938: 'nuclear-gauge',
  report: 'plain', reported: 'plain', other: 'plain',
  judgment: 'judgement', qa: 'verification', qc: 'required',
  d2216: 'oven', d4643: 'microwave', d4944: 'carbide', speedy: 'carbide', nuclear2: 'gauge',
  direct: 'direct-transmission', dt: 'direct-transmission', bs: 'backscatter',
}

/** Small letters and digits: how words and heads are compared. */
export function plainWord(text: string): string {
  return text.normalize('NFKD').toLowerCase().replace(/[^\p{L}\p{N}]/gu, '')
}

/** The choice a word means, or undefined. */
export function readWord<T extends string>(text: string, words: Readonly<Record<T, string>>): T | undefined {
  const said = plainWord(text)
  const keys = Object.keys(words) as T[]
  return keys.find((key) => plainWord(words[key]) === said || plainWord(key) === said) ?? keys.find((key) => key === OTHER_WORDS[said])
}
