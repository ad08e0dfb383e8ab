/**
 * Whole shares of a whole total in proportion to weights, by largest remainder: each share is the exact one
 * rounded down or up, and together they are the total. Equal remainders go to the lower index.
 * @param total whole number, 0 or more
 * @param weights 0 or more each, at least one above 0
 * @returns whole shares in the order of the weights; 0 for a weight of 0
 * @throws RangeError when there is nothing to share by, or the total is not a whole number
 */
export function apportion(total: number, weights: readonly number[]): number[] {
  const sum = weights.reduce((a, b) => a + b, 0)
  if (!Number.isSafeInteger(total) || total < 0) throw new RangeError('The total to share must be a whole number')
  if (!(sum > 0)) throw new RangeError('There is no weight to share by')
  const exact = weights.map((weight) => (weight / sum) * total)
  const shares = exact.map(Math.floor)
  let left = total - shares.reduce((a, b) => a + b, 0)
  const order = exact
    .map((value, index) => ({ index, remainder: value - Math.floor(value) }))
    .filter(({ index }) => (weights[index] ?? 0) > 0)
    .sort((a, b) => b.remainder - a.remainder || a.index - b.index)
  // the quotients are doubles: for very large totals a floor can be off by one, so go round until nothing is left
  while (left > 0) {
    for (const { index } of order) {
      if (left <= 0) break
      shares[index] = (shares[index] ?? 0) + 1
      left--
    }
  }
  for (const { index } of [...order].reverse()) {
    if (left >= 0) break
    if ((shares[index] ?? 0) === 0) continue
    shares[index] = (shares[index] ?? 0) - 1
    left++
  }
  return shares
}
