import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { convertLength } from '#shared/units/length.ts'
import type { LengthUnit } from '#shared/units/length.ts'

/** A method that digs a hole and measures it. */
export type HoleMethod = 'sand-cone' | 'rubber-balloon'

type HoleLimits = {
  readonly standard: string
  /** Least hole volume, cm³, up to each largest particle, mm; the last row is the largest particle the method takes. */
  readonly least: readonly { readonly particleMm: number; readonly cm3: number }[]
  /** Above this the method gives way to those for larger holes; null where its scope names none. */
  readonly greatestCm3: number | null
}

/**
 * D1556: 0.05 ft³ to ½ in, 0.075 to 1 in, 0.1 to 1½ in, which is its scope, and holes of 0.1 ft³ at most. D2167: 0.05 ft³ to
 * ½ in, 0.075 to 1 in, 0.1 to 1½ in, and 0.1 ft³ or more above. The least volumes are from memory of the standards' tables.
 */
const LIMITS: Readonly<Record<HoleMethod, HoleLimits>> = {
  'sand-cone': {
    standard: 'D1556',
    least: [{ particleMm: 12.7, cm3: 1415 }, { particleMm: 25.4, cm3: 2125 }, { particleMm: 38.1, cm3: 2830 }],
    greatestCm3: 2830,
  },
  'rubber-balloon': {
    standard: 'D2167',
    least: [{ particleMm: 12.7, cm3: 1420 }, { particleMm: 25.4, cm3: 2120 }, { particleMm: 38.1, cm3: 2840 }],
    greatestCm3: null,
  },
}

/** Size of the largest particle seen in a hole, and its unit; left out where it was not looked at. */
export type LargestParticle = { readonly largestParticle?: number | undefined; readonly lengthUnit?: LengthUnit | undefined }

/** What is wrong with a particle size as entered. */
export function particleProblems({ largestParticle }: LargestParticle): FieldProblem[] {
  if (largestParticle === undefined || (Number.isFinite(largestParticle) && largestParticle >= 0)) return []
  return [{ field: 'largestParticle', code: 'negative', message: 'The largest particle must be zero or more, or left out.' }]
}

/**
 * Where a hole lies outside the limits of its method: too small for the stones in it, stones too large, hole too large.
 * @param holeVolumeCm3 above zero
 * @returns flags; the result stands
 */
export function holeFlags(method: HoleMethod, particle: LargestParticle, holeVolumeCm3: number): Reason[] {
  const { standard, least, greatestCm3 } = LIMITS[method]
  const particleMm = particle.largestParticle === undefined ? 0 : convertLength(particle.largestParticle, particle.lengthUnit ?? 'mm', 'mm')
  const row = least.find((each) => particleMm <= each.particleMm + 1e-9)
  const needed = (row ?? least[least.length - 1])?.cm3 ?? 0
  const size = `${Math.round(holeVolumeCm3)}\u2009cm³`
  const flags: Reason[] = []
  if (row === undefined) {
    flags.push({ code: 'particle-large', message: `Particles above 38\u2009mm (1½\u2009in) are outside ${standard}. Use a method for larger holes.` })
  }
  if (holeVolumeCm3 < needed) {
    flags.push({ code: 'hole-small', message: `The hole (${size}) is smaller than ${standard} advises for this particle size (${needed}\u2009cm³).` })
  }
  if (greatestCm3 !== null && holeVolumeCm3 > greatestCm3 * 1.001) {
    flags.push({ code: 'hole-large', message: `The hole (${size}) is larger than ${standard} covers (${greatestCm3}\u2009cm³).` })
  }
  return flags
}
