import { oversizeSieve } from '#shared/domain/oversize.ts'
import type { CurveLetter, CurveMethod, OversizeSieve } from '#shared/domain/oversize.ts'
import type { Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'
import { convertVolume } from '#shared/units/volume.ts'

export type MouldSize = '4-in' | '6-in'

/** How a laboratory compacts a specimen by one method and letter. */
export interface CompactionMethod {
  readonly mould: MouldSize
  readonly volumeCm3: number
  readonly volumeToleranceCm3: number
  readonly layers: number
  /** blows a layer */
  readonly blows: number
  /** rammer, pounds-force, and its drop, inches */
  readonly rammerLbf: number
  readonly dropIn: number
  readonly sieve: OversizeSieve
  /** the method may be used up to this share retained on its sieve, percent */
  readonly mostOversize: number
}

/** 4 in: 0.0333 ± 0.0005 ft³; 6 in: 0.0750 ± 0.0009 ft³ (volumes from the moulds' dimensions, tolerances from memory). */
const MOULDS: Readonly<Record<MouldSize, { readonly volumeCm3: number; readonly toleranceCm3: number; readonly blows: number }>> = {
  '4-in': { volumeCm3: 944, toleranceCm3: 14, blows: 25 },
  '6-in': { volumeCm3: 2124, toleranceCm3: 25, blows: 56 },
}

/** Standard effort: 5.5 lbf dropped 12 in on 3 layers; modified: 10 lbf dropped 18 in on 5. */
const EFFORTS = {
  standard: { rammerLbf: 5.5, dropIn: 12, layers: 3 },
  modified: { rammerLbf: 10, dropIn: 18, layers: 5 },
} as const

type Letter = { readonly mould: MouldSize; readonly mostOversize: number }

/** D698-07 and D1557 alike: A and B in the 4 in mould up to 25 % on the No. 4 and 3/8 in, C in the 6 in up to 30 % on the 3/4 in. */
const ASTM_LETTERS: Partial<Readonly<Record<CurveLetter, Letter>>> = {
  A: { mould: '4-in', mostOversize: 25 },
  B: { mould: '4-in', mostOversize: 25 },
  C: { mould: '6-in', mostOversize: 30 },
}

/** T 99 and T 180: A and C in the 4 in mould, B and D in the 6 in; up to 40 % on the No. 4 (A, B) or 30 % on the 3/4 in (C, D). */
const AASHTO_LETTERS: Readonly<Record<CurveLetter, Letter>> = {
  A: { mould: '4-in', mostOversize: 40 },
  B: { mould: '6-in', mostOversize: 40 },
  C: { mould: '4-in', mostOversize: 30 },
  D: { mould: '6-in', mostOversize: 30 },
}

const isAstm = (method: CurveMethod): boolean => method === 'D698' || method === 'D1557'

/**
 * The apparatus and limits of a laboratory compaction method (D698-07, D1557, T 99, T 180).
 * @returns null where the method has no such letter: D698 and D1557 end at C
 */
export function compactionMethod(method: CurveMethod, letter: CurveLetter): CompactionMethod | null {
  const own = isAstm(method) ? ASTM_LETTERS[letter] : AASHTO_LETTERS[letter]
  if (own === undefined) return null
  const { volumeCm3, toleranceCm3, blows } = MOULDS[own.mould]
  const effort = EFFORTS[method === 'D698' || method === 'T 99' ? 'standard' : 'modified']
  return { mould: own.mould, volumeCm3, volumeToleranceCm3: toleranceCm3, blows, ...effort, sieve: oversizeSieve(method, letter), mostOversize: own.mostOversize }
}

/** The letters a method has. */
export function methodLetters(method: CurveMethod): readonly CurveLetter[] {
  return isAstm(method) ? ['A', 'B', 'C'] : ['A', 'B', 'C', 'D']
}

/**
 * Energy of compaction by volume: rammer · drop · blows · layers / volume.
 * @returns ft·lbf/ft³
 */
export function compactionEnergy({ rammerLbf, dropIn, blows, layers, volumeCm3 }: Pick<CompactionMethod, 'rammerLbf' | 'dropIn' | 'blows' | 'layers' | 'volumeCm3'>): number {
  return (rammerLbf * (dropIn / 12) * blows * layers) / convertVolume(volumeCm3, 'cm3', 'ft3')
}

/** What the laboratory used; null where it was not said. */
export interface UsedApparatus {
  readonly mouldVolumeCm3: number | null
  readonly layers: number | null
  readonly blows: number | null
  /** retained on the method's sieve, percent of the dry mass */
  readonly oversizePercent: number | null
}

export type ApparatusCheck =
  /** the method may not be used; `letter` is one that may, null where none does */
  | { readonly ok: false; readonly field: 'procedure' | 'oversizePercent'; readonly reason: Reason; readonly letter: CurveLetter | null }
  /** each flag is a departure a laboratory may have had its reasons for */
  | { readonly ok: true; readonly flags: readonly (Reason & { readonly field: 'mouldVolume' | 'layers' | 'blows' })[] }

const SIEVE_NAMES = { 'no-4': 'No. 4', '3/8-in': '3/8 in', '3/4-in': '3/4 in' } as const

/**
 * Holds what a laboratory used to its method: refused where too much is retained on the sieve for the method to be used,
 * flagged where mould, layers or blows depart from it.
 */
export function checkApparatus(method: CurveMethod, letter: CurveLetter, used: UsedApparatus): ApparatusCheck {
  const own = compactionMethod(method, letter)
  if (own === null) {
    return { ok: false, field: 'procedure', letter: 'C', reason: { code: 'no-such-letter', message: `${method} has methods A, B and C.` } }
  }
  const { oversizePercent, mouldVolumeCm3, layers, blows } = used
  if (oversizePercent !== null && settle(oversizePercent) > own.mostOversize) {
    const coarser = coarserLetter(method, own.sieve)
    const advice = coarser === null ? 'No method of this standard takes it.' : `Method ${coarser} may.`
    return {
      ok: false,
      field: 'oversizePercent',
      letter: coarser,
      reason: { code: 'too-coarse', message: `${method} method ${letter} takes at most ${own.mostOversize} % retained on the ${SIEVE_NAMES[own.sieve]}. ${advice}` },
    }
  }
  const flags = [
    ...(mouldVolumeCm3 !== null && Math.abs(mouldVolumeCm3 - own.volumeCm3) > own.volumeToleranceCm3
      ? [{ field: 'mouldVolume', code: 'mould-volume', message: `Method ${letter} uses the ${own.mould === '4-in' ? '4 in' : '6 in'} mould, ${own.volumeCm3} ± ${own.volumeToleranceCm3}\u2009cm³.` } as const]
      : []),
    ...(layers !== null && layers !== own.layers ? [{ field: 'layers', code: 'layers', message: `${method} compacts ${own.layers} layers.` } as const] : []),
    ...(blows !== null && blows !== own.blows ? [{ field: 'blows', code: 'blows', message: `In this mould ${method} gives ${own.blows} blows a layer.` } as const] : []),
  ]
  return { ok: true, flags }
}

/** The first letter whose sieve is coarser, or null. */
function coarserLetter(method: CurveMethod, sieve: OversizeSieve): CurveLetter | null {
  const order: readonly OversizeSieve[] = ['no-4', '3/8-in', '3/4-in']
  return methodLetters(method).find((letter) => order.indexOf(oversizeSieve(method, letter)) > order.indexOf(sieve)) ?? null
}
