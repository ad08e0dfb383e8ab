/**
 * A generator of uniform numbers from a 128-bit seed: the small fast counting generator sfc32 (C. Doty-Humphrey,
 * PractRand), first twelve outputs dropped. The same seed gives the same numbers on every machine.
 * @param seed 32 hexadecimal digits
 * @returns a function giving the next number, 0 or more and below 1, in steps of 2^-32
 * @throws RangeError when the seed is not 32 hexadecimal digits
 */
export function seededRandom(seed: string): () => number {
  if (!/^[0-9a-f]{32}$/i.test(seed)) throw new RangeError('A seed is 32 hexadecimal digits')
  let [a, b, c, counter] = [0, 8, 16, 24].map((at) => Number.parseInt(seed.slice(at, at + 8), 16) | 0)
  const next = () => {
    const out = (((a + b) | 0) + counter) | 0
    counter = (counter + 1) | 0
    a = b ^ (b >>> 9)
    b = (c + (c << 3)) | 0
    c = (c << 21) | (c >>> 11)
    c = (c + out) | 0
    return (out >>> 0) / 2 ** 32
  }
  for (let drop = 0; drop < 12; drop++) next()
  return next
}

/**
 * The location a random number names along a length: start + R·length (random number tables).
 * @param start where the length begins, any unit
 * @param length in the same unit, 0 or more
 * @param random 0 or more and below 1
 */
export function randomLocation(start: number, length: number, random: number): number {
  return start + random * length
}
