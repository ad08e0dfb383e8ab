/**
 * A rule that says how many tests fill needs (domain section 6). Amounts as the specification writes them
 * are converted by the caller: volumes cm³, areas mm², lengths mm.
 */
export type FrequencyRule =
  | { readonly kind: 'volume'; readonly scope: 'lot' | 'running'; readonly perCm3: number }
  | { readonly kind: 'area'; readonly perMm2: number }
  | { readonly kind: 'length'; readonly perMm: number }
  | { readonly kind: 'per-lot'; readonly atLeast: number }
  | { readonly kind: 'per-lift-day'; readonly atLeast: number }

/**
 * A rule's amount in whole units, rounded up: one per 250 yd³ is 191,138,714.496 cm³, and rounded down four tests
 * would fall 2 cm³ short of 1,000 yd³ and ask a fifth.
 * @param exact the amount converted to cm³, mm² or mm, above 0
 */
export function wholeRuleAmount(exact: number): number {
  return Math.ceil(exact - 1e-6)
}
