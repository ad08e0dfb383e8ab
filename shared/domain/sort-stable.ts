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
  for (let i = 0; i < keys.length; i++) if (keys[i] > largest) largest = keys[i]
  // two halves of two digits and more, so that digits come by integer shifts
  const low = new Int32Array(keys.length)
  const high = new Int32Array(keys.length)
  for (let i = 0; i < keys.length; i++) {
    high[i] = Math.floor(keys[i] / (BASE * BASE))
    low[i] = keys[i] - high[i] * (BASE * BASE)
  }
  let sorted = order
  for (let digit = 0; BASE ** digit <= largest; digit++) {
    sorted = sortByDigit(sorted, digit < 2 ? low : high, (digit < 2 ? digit : digit - 2) * DIGIT_BITS)
  }
  return sorted
}

function sortByDigit(from: Uint32Array, halves: Int32Array, shift: number): Uint32Array {
  const to = new Uint32Array(from.length)
  const starts = new Uint32Array(BASE + 1)
  for (let i = 0; i < from.length; i++) starts[((halves[from[i]] >>> shift) & (BASE - 1)) + 1]++
  for (let digit = 0; digit < BASE; digit++) starts[digit + 1] += starts[digit]
  for (let i = 0; i < from.length; i++) to[starts[(halves[from[i]] >>> shift) & (BASE - 1)]++] = from[i]
  return to
}
