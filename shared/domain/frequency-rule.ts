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
