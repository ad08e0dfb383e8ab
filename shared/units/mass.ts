/** Grams in one of each unit. The avoirdupois pound is exactly 453.59237 g (international yard and pound agreement, 1959). */
const GRAMS = { g: 1, kg: 1000, lb: 453.59237 } as const

export type MassUnit = keyof typeof GRAMS

/**
 * Converts a mass.
 * @param value the mass, in `from`, any finite number
 * @returns the mass in `to`
 */
export function convertMass(value: number, from: MassUnit, to: MassUnit): number {
  return from === to ? value : (value * GRAMS[from]) / GRAMS[to]
}
