import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'

/** Drying is done when a further interval changes the mass by no more than this share of the wet soil, percent (D4643, from memory). */
export const CONSTANT_MASS_PERCENT = 0.1

/** Weighings of one tin dried in steps, all in one unit: the last is `dryAndTin`. */
export type DryingSteps = { readonly wetAndTin: number; readonly dryAndTin: number; readonly tin: number; readonly earlier?: readonly number[] | undefined }

export type Drying = {
  /** the last change, percent of the wet soil; null after a single weighing */
  readonly lastChangePercent: number | null
  /** null where a single weighing cannot tell */
  readonly constant: boolean | null
}

/**
 * Whether a tin has dried to constant mass (D4643): the last interval took no more than 0.1 % of the wet soil's mass.
 * @param steps masses that {@link dryingProblems} found nothing wrong with
 */
export function judgeDrying({ wetAndTin, dryAndTin, tin, earlier = [] }: DryingSteps): Drying {
  const before = earlier[earlier.length - 1]
  if (before === undefined) return { lastChangePercent: null, constant: null }
  const lastChangePercent = (100 * Math.abs(before - dryAndTin)) / (wetAndTin - tin)
  return { lastChangePercent, constant: settle(lastChangePercent) <= CONSTANT_MASS_PERCENT }
}

/**
 * What is wrong with the weighings between wet and dry.
 * @param path dotted path put before each field name
 */
export function dryingProblems({ wetAndTin, tin, earlier = [] }: DryingSteps, path: string): FieldProblem[] {
  return earlier.flatMap((mass, i): FieldProblem[] => {
    const field = `${path}.earlier.${i}`
    if (!Number.isFinite(mass)) return [{ field, code: 'missing', message: `Enter weighing ${i + 1}, or take it out.` }]
    if (mass > wetAndTin) return [{ field, code: 'dry-heavier', message: `Weighing ${i + 1} is heavier than the wet soil. Check which is which.` }]
    if (mass <= tin) return [{ field, code: 'no-soil', message: `Weighing ${i + 1} is no heavier than the tin. Check which is which.` }]
    return []
  })
}

/** A flag where the last two weighings still differ, or the soil grew heavier in the oven. */
export function dryingFlags(steps: DryingSteps): Reason[] {
  const { lastChangePercent, constant } = judgeDrying(steps)
  if (constant !== false || lastChangePercent === null) return []
  return [{
    code: 'not-constant-mass',
    message: `The last interval still changed the mass by ${lastChangePercent.toFixed(2)} % of the wet soil; ${CONSTANT_MASS_PERCENT} % is constant. Dry for another minute and weigh again.`,
  }]
}
