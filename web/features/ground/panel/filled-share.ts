/** Percent of a design volume that is placed, rounded down to 0.1 so that 100.0 is said only when it is full. */
export function filledShare(placedCm3: number, designCm3: number): number {
  return designCm3 > 0 ? Math.floor((placedCm3 / designCm3) * 1000 + 1e-9) / 10 : 0
}
