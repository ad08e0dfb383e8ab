const DIGIT_BITS = 11
const BASE = 1 << DIGIT_BITS

/**
 * Stable sort of indices by whole keys, least significant digit first: a lot's pairs of fill and test run to hundreds
 * of thousands, where a comparison sort takes most of a second.
 * @param order indices into keys
 * @param keys whole numbers from 0 to 2^53 − 1
 * @returns the indices by rising key; equal keys keep their order
 */
export function sortStable(order: Uint32Array, keys: Float64Array): Uint32Array {
  let largest = 0
  for (const index of order) largest = Math.max(largest, keys[index])
  let from = order
  for (let weight = 1; weight <= largest; weight *= BASE) {
    const to = new Uint32Array(from.length)
    const starts = new Uint32Array(BASE + 1)
    for (const index of from) starts[digitOf(keys[index], weight) + 1]++
    for (let digit = 0; digit < BASE; digit++) starts[digit + 1] += starts[digit]
    for (const index of from) to[starts[digitOf(keys[index], weight)]++] = index
    from = to
  }
  return from
}

function digitOf(key: number, weight: number): number {
  return Math.floor(key / weight) % BASE
}
