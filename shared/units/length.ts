/**
 * Metres in one of each unit, all exact by definition: the international foot is 0.3048 m, the US survey foot
 * 1200/3937 m (C-3 of the check values). The two differ by 2 parts per million and are never mixed silently.
 */
const METRES = {
  µm: 1e-6,
  mm: 0.001,
  cm: 0.01,
  m: 1,
  km: 1000,
  in: 0.0254,
  ft: 0.3048,
  'us-ft': 1200 / 3937,
  yd: 0.9144,
} as const

/** Micrometres in one of each unit: whole numbers except for the US survey foot, so that µm values come out exact. */
const MICROMETRES = {
  µm: 1,
  mm: 1_000,
  cm: 10_000,
  m: 1_000_000,
  km: 1_000_000_000,
  in: 25_400,
  ft: 304_800,
  'us-ft': 1_200_000_000 / 3937,
  yd: 914_400,
} as const

export type LengthUnit = keyof typeof METRES

/**
 * Converts a length.
 * @param value the length, in `from`, any finite number
 * @returns the length in `to`
 */
export function convertLength(value: number, from: LengthUnit, to: LengthUnit): number {
  return from === to ? value : (value * METRES[from]) / METRES[to]
}

/**
 * An elevation or a thickness as the whole micrometres in which they are kept (1 in = 25,400; 1 ft = 304,800).
 * @param value the length, in `unit`; at most 9,000 km, so that the result is a safe integer
 * @returns whole micrometres, the nearest
 */
export function toMicrometres(value: number, unit: LengthUnit): number {
  return Math.round(value * MICROMETRES[unit])
}

/**
 * The reverse of {@link toMicrometres}.
 * @param micrometres whole micrometres
 * @returns the length in `unit`
 */
export function fromMicrometres(micrometres: number, unit: LengthUnit): number {
  return micrometres / MICROMETRES[unit]
}
