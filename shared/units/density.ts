/** Standard gravity, m/s², exact (CGPM 1901): what turns a density into a unit weight. */
export const STANDARD_GRAVITY = 9.80665

const KG_PER_LB = 0.45359237
const M3_PER_FT3 = 0.3048 ** 3

/**
 * kg/m³ in one of each unit. pcf (pounds-force per cubic foot) and kN/m³ are unit weights under standard gravity, so
 * that 1 pcf is also one avoirdupois pound of mass per cubic foot; lb/yd3 is pounds of mass per cubic yard.
 */
const KG_PER_M3 = {
  'kg/m3': 1,
  'g/cm3': 1000,
  pcf: KG_PER_LB / M3_PER_FT3,
  'kN/m3': 1000 / STANDARD_GRAVITY,
  'lb/yd3': KG_PER_LB / (27 * M3_PER_FT3),
} as const

export type DensityUnit = keyof typeof KG_PER_M3

/** How each unit is written on sheets. */
export const DENSITY_UNIT_LABEL: Readonly<Record<DensityUnit, string>> = {
  'kg/m3': 'kg/m³',
  'g/cm3': 'g/cm³',
  pcf: 'pcf',
  'kN/m3': 'kN/m³',
  'lb/yd3': 'lb/yd³',
}

/**
 * Converts a density or unit weight.
 * @param value in `from`, any finite number
 * @returns the same in `to`
 */
export function convertDensity(value: number, from: DensityUnit, to: DensityUnit): number {
  return from === to ? value : (value * KG_PER_M3[from]) / KG_PER_M3[to]
}
