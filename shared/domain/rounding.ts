/** What to do with a value exactly half way: to the even digit, or up (away from zero). */
export type Ties = 'even' | 'up'

/**
 * How an observed value is compared with a limit (ASTM E29): the absolute method compares it unrounded, the rounding
 * method first rounds it to the last place of the limit as it is written.
 */
export type RoundingRule = { readonly method: 'absolute' } | { readonly method: 'rounding'; readonly ties: Ties }

/** A limit as written: its value, and how many decimals it is written with. */
export type WrittenLimit = { readonly value: number; readonly decimals: number }

const WRITTEN = /^\s*([+\-−]?)\s*(\d{1,6})(?:\.(\d{0,6}))?\s*$/

/**
 * Reads a limit as it is written: "95", "95.0", "+2", "−2.5" (a hyphen or a true minus).
 * @returns value and decimals, or null when the text is not a plain decimal number of at most six digits either side
 */
export function parseLimit(text: string): WrittenLimit | null {
  const match = WRITTEN.exec(text)
  if (!match) return null
  const [, sign = '', whole = '0', fraction = ''] = match
  const size = Number(`${whole}.${fraction || '0'}`)
  const negative = sign !== '' && sign !== '+' && size !== 0
  return { value: negative ? -size : size, decimals: fraction.length }
}

/**
 * Takes the dust of binary arithmetic off a computed quantity, so that 0.95 of the maximum is exactly 95 %.
 * @param value any finite number of ordinary size (a percentage, a density)
 * @returns the value to the ninth decimal
 */
export function settle(value: number): number {
  return Number(value.toFixed(9)) || 0
}

/**
 * Rounds the *decimal* number that `value` prints as, so that 4.65 and 94.95 are true ties.
 * @param value any finite number (anything else comes back as it is)
 * @param decimals last place kept, 0 to 12
 * @param ties where an exact half goes: the even digit (ASTM E29), or up, away from zero
 * @returns the nearest value with that many decimals; never −0
 */
export function roundToPlace(value: number, decimals: number, ties: Ties): number {
  if (!Number.isFinite(value)) return value
  const [mantissa = '0', exponent = '0'] = String(Math.abs(value)).split('e')
  const [whole = '0', fraction = ''] = mantissa.split('.')
  const scale = fraction.length - Number(exponent)
  if (scale <= decimals) return value || 0
  const digits = BigInt(whole + fraction)
  const unit = 10n ** BigInt(scale - decimals)
  const floor = digits / unit
  const twice = 2n * (digits % unit)
  const up = twice > unit || (twice === unit && (ties === 'up' || floor % 2n === 1n))
  const size = Number(`${up ? floor + 1n : floor}e-${decimals}`)
  return value < 0 && size !== 0 ? -size : size
}

/**
 * Whether an observed value meets a written limit, rounding once, here (ASTM E29 section 4 and 5). A value exactly on
 * the limit meets it.
 * @param value unrounded, in the limit's unit
 * @param limit as {@link parseLimit} read it
 */
export function meets(value: number, limit: WrittenLimit, side: 'min' | 'max', rule: RoundingRule): boolean {
  const settled = settle(value)
  const compared = rule.method === 'absolute' ? settled : roundToPlace(settled, limit.decimals, rule.ties)
  return side === 'min' ? compared >= limit.value : compared <= limit.value
}
