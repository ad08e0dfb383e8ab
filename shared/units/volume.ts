const CM3_PER_IN3 = 2.54 ** 3
const CM3_PER_FT3 = 30.48 ** 3

/** Cubic centimetres in one of each unit, from the exact inch and foot; the US gallon is exactly 231 in³. */
const CUBIC_CENTIMETRES = {
  cm3: 1,
  L: 1000,
  m3: 1_000_000,
  in3: CM3_PER_IN3,
  ft3: CM3_PER_FT3,
  yd3: 27 * CM3_PER_FT3,
  gal: 231 * CM3_PER_IN3,
} as const

export type VolumeUnit = keyof typeof CUBIC_CENTIMETRES

/** A unit as it is written after a figure. */
export const VOLUME_UNIT_LABEL: Readonly<Record<VolumeUnit, string>> = { cm3: 'cm³', L: 'L', m3: 'm³', in3: 'in³', ft3: 'ft³', yd3: 'cy', gal: 'gal' }

/**
 * Converts a volume. It says nothing of the volume's kind: bank, loose and compacted are never added.
 * @param value in `from`, any finite number
 * @returns the volume in `to`
 */
export function convertVolume(value: number, from: VolumeUnit, to: VolumeUnit): number {
  return from === to ? value : (value * CUBIC_CENTIMETRES[from]) / CUBIC_CENTIMETRES[to]
}

/**
 * A volume as the whole cubic centimetres in which volumes are allocated and counted.
 * @param value in `unit`; at most 9 km³, so that the result is a safe integer
 * @returns whole cm³, the nearest
 */
export function toCubicCentimetres(value: number, unit: VolumeUnit): number {
  return Math.round(value * CUBIC_CENTIMETRES[unit])
}
