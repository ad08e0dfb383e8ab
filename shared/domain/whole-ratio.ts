/**
 * The smallest whole number that is at least factor × times / per, exact where the product passes 2^53.
 * @param factor whole number, 0 or more
 * @param times whole number, 0 or more
 * @param per whole number above 0
 * @returns ⌈factor × times / per⌉
 * @throws RangeError when an argument is not a safe whole number or per is 0
 */
export function ceilRatio(factor: number, times: number, per: number): number {
  const [a, b, divisor] = [BigInt(factor), BigInt(times), BigInt(per)]
  return Number((a * b + divisor - 1n) / divisor)
}
