import { oversizeSieve } from '#shared/domain/oversize.ts'
import type { CurveLetter, CurveMethod, OversizeSieve } from '#shared/domain/oversize.ts'
import type { Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'
import { convertVolume } from '#shared/units/volume.ts'

export type MouldSize = '4-in' | '6-in'

/** The issue of D698 and D1557 a laboratory worked by; T 99 and T 180 are read in one. */
export type MethodEdition = '2007' | '2000'

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

/**
 * D698 and D1557 alike: A and B in the 4 in mould on the No. 4 and 3/8 in, C in the 6 in mould up to 30 % on the 3/4 in. The
 * issue of 2007 lets A and B be used up to 25 % retained, that of 2000 up to 20 %.
 */
const ASTM_LETTERS: Readonly<Record<MethodEdition, Partial<Readonly<Record<CurveLetter, Letter>>>>> = {
  '2007': { A: { mould: '4-in', mostOversize: 25 }, B: { mould: '4-in', mostOversize: 25 }, C: { mould: '6-in', mostOversize: 30 } },
  '2000': { A: { mould: '4-in', mostOversize: 20 }, B: { mould: '4-in', mostOversize: 20 }, C: { mould: '6-in', mostOversize: 30 } },
}

/** T 99 and T 180: A and C in the 4 in mould, B and D in the 6 in; up to 40 % on the No. 4 (A, B) or 30 % on the 3/4 in (C, D). */
const AASHTO_LETTERS: Readonly<Record<CurveLetter, Letter>> = {
  A: { mould: '4-in', mostOversize: 40 },
  B: { mould: '6-in', mostOversize: 40 },
  C: { mould: '4-in', mostOversize: 30 },
  D: { mould: '6-in', mostOversize: 30 },
}

const isAstm = (method: CurveMethod): boolean => method === 'D698' || method === 'D1557'

/** Whether a method's limits depend on its issue. */
export const hasEditions = isAstm

/**
 * The apparatus and limits of a laboratory compaction method (D698, D1557, T 99, T 180).
 * @param edition of D698 and D1557; T 99 and T 180 do not ask for it
 * @returns null where the method has no such letter: D698 and D1557 end at C
 */
export function compactionMethod(method: CurveMethod, letter: CurveLetter, edition: MethodEdition = '2007'): CompactionMethod | null {
  const own = isAstm(method) ? ASTM_LETTERS[edition][letter] : AASHTO_LETTERS[letter]
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

/** Energy a method names, ft·lbf/ft³; one mould and its blows come within 1 % of it. */
const NOMINAL_ENERGY = { standard: 12_400, modified: 56_000 } as const
/** From here on another effort was spent than the method's (our own bound: common practice knows none). */
const ENERGY_TOLERANCE = 0.05

/** What the laboratory used; null where it was not said. */
export interface UsedApparatus {
  readonly edition?: MethodEdition | undefined
  readonly mould?: MouldSize | null | undefined
  readonly mouldVolumeCm3: number | null
  readonly layers: number | null
  readonly blows: number | null
  /** retained on the method's sieve, percent of the dry mass */
  readonly oversizePercent: number | null
}

export type ApparatusFlag = Reason & { readonly field: 'mould' | 'mouldVolume' | 'layers' | 'blows' | 'energy' }

export type ApparatusCheck =
  /** the method may not be used; `letter` is one that may, null where none does */
  | { readonly ok: false; readonly field: 'procedure' | 'oversizePercent'; readonly reason: Reason; readonly letter: CurveLetter | null }
  /** each flag is a departure a laboratory may have had its reasons for */
  | { readonly ok: true; readonly flags: readonly ApparatusFlag[] }

const SIEVE_NAMES = { 'no-4': 'No. 4', '3/8-in': '3/8 in', '3/4-in': '3/4 in' } as const
const MOULD_NAMES = { '4-in': '4 in', '6-in': '6 in' } as const

/**
 * Holds what a laboratory used to its method: refused where too much is retained on the sieve for the method to be used,
 * flagged where mould, layers, blows or the energy they make depart from it.
 */
export function checkApparatus(method: CurveMethod, letter: CurveLetter, used: UsedApparatus): ApparatusCheck {
  const edition = used.edition ?? '2007'
  const own = compactionMethod(method, letter, edition)
  if (own === null) {
    return { ok: false, field: 'procedure', letter: 'C', reason: { code: 'no-such-letter', message: `${method} has methods A, B and C.` } }
  }
  const { oversizePercent } = used
  if (oversizePercent !== null && settle(oversizePercent) > own.mostOversize) {
    const coarser = coarserLetter(method, own.sieve)
    const advice = coarser === null ? 'No method of this standard takes it.' : `Method ${coarser} may.`
    const name = isAstm(method) ? `${method}-${edition.slice(2)}` : method
    return {
      ok: false,
      field: 'oversizePercent',
      letter: coarser,
      reason: { code: 'too-coarse', message: `${name} method ${letter} takes at most ${own.mostOversize} % retained on the ${SIEVE_NAMES[own.sieve]}. ${advice}` },
    }
  }
  return { ok: true, flags: departures(method, letter, own, used) }
}

function departures(method: CurveMethod, letter: CurveLetter, own: CompactionMethod, { mould = null, mouldVolumeCm3, layers, blows }: UsedApparatus): ApparatusFlag[] {
  const flags: ApparatusFlag[] = []
  const flag = (field: ApparatusFlag['field'], code: string, message: string) => flags.push({ field, code, message })
  if (mould !== null && mould !== own.mould) flag('mould', 'mould', `${method} method ${letter} uses the ${MOULD_NAMES[own.mould]} mould.`)
  if (mouldVolumeCm3 !== null && Math.abs(mouldVolumeCm3 - own.volumeCm3) > own.volumeToleranceCm3) {
    flag('mouldVolume', 'mould-volume', `Method ${letter} uses the ${MOULD_NAMES[own.mould]} mould, ${own.volumeCm3} ± ${own.volumeToleranceCm3}\u2009cm³.`)
  }
  if (layers !== null && layers !== own.layers) flag('layers', 'layers', `${method} compacts ${own.layers} layers.`)
  if (blows !== null && blows !== own.blows) flag('blows', 'blows', `In this mould ${method} gives ${own.blows} blows a layer.`)
  if (layers !== null && blows !== null) {
    const volumeCm3 = mouldVolumeCm3 ?? (mould === null ? own.volumeCm3 : MOULDS[mould].volumeCm3)
    const share = compactionEnergy({ ...own, layers, blows, volumeCm3 }) / nominalEnergy(method)
    if (Number.isFinite(share) && Math.abs(share - 1) > ENERGY_TOLERANCE) {
      flag('energy', 'energy', `Layers, blows and mould make ${Math.round(100 * share)} % of the energy of ${method}: the maximum is another effort’s.`)
    }
  }
  return flags
}

/** The energy a method names, ft·lbf/ft³ (titles of D698 and D1557). */
export function nominalEnergy(method: CurveMethod): number {
  return NOMINAL_ENERGY[method === 'D698' || method === 'T 99' ? 'standard' : 'modified']
}

/** The first letter whose sieve is coarser, or null. */
function coarserLetter(method: CurveMethod, sieve: OversizeSieve): CurveLetter | null {
  const order: readonly OversizeSieve[] = ['no-4', '3/8-in', '3/4-in']
  return methodLetters(method).find((letter) => order.indexOf(oversizeSieve(method, letter)) > order.indexOf(sieve)) ?? null
}
