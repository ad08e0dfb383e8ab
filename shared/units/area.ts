const M2_PER_FT2 = 0.3048 ** 2
const M2_PER_US_FT2 = (1200 / 3937) ** 2

/** Square metres in one of each unit, from the exact foot; an acre here is 43,560 international square feet. */
const SQUARE_METRES = {
  mm2: 1e-6,
  m2: 1,
  ha: 10_000,
  ft2: M2_PER_FT2,
  'us-ft2': M2_PER_US_FT2,
  yd2: 9 * M2_PER_FT2,
  ac: 43_560 * M2_PER_FT2,
} as const

export type AreaUnit = keyof typeof SQUARE_METRES

/**
 * Converts an area.
 * @param value in `from`, any finite number
 * @returns the area in `to`
 */
export function convertArea(value: number, from: AreaUnit, to: AreaUnit): number {
  return from === to ? value : (value * SQUARE_METRES[from]) / SQUARE_METRES[to]
}
