/** What to do with a value exactly half way: to the even digit, or up (away from zero). */
export type Ties = 'even' | 'up'

/**
 * How an observed value is compared with a limit (ASTM E29): the absolute method compares it unrounded, the rounding
 * method first rounds it to the last place of the limit as it is written.
 */
export type RoundingRule = { readonly method: 'absolute' } | { readonly method: 'rounding'; readonly ties: Ties }
