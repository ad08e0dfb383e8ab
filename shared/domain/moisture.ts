import type { FieldProblem } from '#shared/domain/result.ts'

/** Three weighings of one moisture tin, all in one unit. */
export type Tin = { readonly wetAndTin: number; readonly dryAndTin: number; readonly tin: number }

/**
 * Moisture from one tin, oven (D2216) or microwave (D4643): w = 100 (wet − dry) / (dry − tin).
 * @param tin checked by {@link tinProblems} first
 * @returns percent of dry mass
 */
export function moistureFromTin({ wetAndTin, dryAndTin, tin }: Tin): number {
  return (100 * (wetAndTin - dryAndTin)) / (dryAndTin - tin)
}

/**
 * The mean moisture of several tins, each weighing the same (as laboratories average top and bottom of a specimen).
 * @param tins one or more
 * @returns percent of dry mass
 */
export function moistureFromTins(tins: readonly Tin[]): number {
  return tins.reduce((sum, tin) => sum + moistureFromTin(tin), 0) / tins.length
}

/**
 * Moisture from a calcium carbide tester (D4944), whose dial reads percent of the *wet* mass: w = 100·r / (100 − r).
 * @param readingPercent r, 0 to below 100
 * @returns percent of dry mass
 */
export function moistureFromCarbide(readingPercent: number): number {
  return (100 * readingPercent) / (100 - readingPercent)
}

/**
 * Moisture from a nuclear gauge (D6938): water over solids, w = 100·M / (ρ − M), then the site's correction.
 * @param wetDensity ρ, above `moistureDensity`, in the same unit
 * @param moistureDensity M, 0 or more
 * @param correctionK K of {@link gaugeCorrectionK}, 0 for none
 * @returns percent of dry mass
 */
export function moistureFromGauge(wetDensity: number, moistureDensity: number, correctionK: number): number {
  const read = (100 * moistureDensity) / (wetDensity - moistureDensity)
  return read + (correctionK * (100 + read)) / 1000
}

/**
 * The site correction from a pair of gauge and oven moisture: K = 1000 (w − wg) / (100 + wg).
 * @param ovenMoisture w, percent
 * @param gaugeMoisture wg, percent, uncorrected
 */
export function gaugeCorrectionK(ovenMoisture: number, gaugeMoisture: number): number {
  return (1000 * (ovenMoisture - gaugeMoisture)) / (100 + gaugeMoisture)
}

/**
 * What is wrong with a tin's weighings, in plain words.
 * @param path dotted path put before each field name
 * @param unit written after masses in the messages, or '' for none
 */
export function tinProblems(tin: Tin, path: string, unit: string): FieldProblem[] {
  const mass = (value: number) => `${value}${unit && `\u2009${unit}`}`
  const problem = (field: keyof Tin, code: string, message: string): FieldProblem[] => [{ field: `${path}.${field}`, code, message }]
  if (!Number.isFinite(tin.wetAndTin)) return problem('wetAndTin', 'missing', 'Enter the mass of wet soil and tin.')
  if (!Number.isFinite(tin.dryAndTin)) return problem('dryAndTin', 'missing', 'Enter the mass of dry soil and tin.')
  if (!Number.isFinite(tin.tin)) return problem('tin', 'missing', 'Enter the mass of the tin.')
  if (tin.wetAndTin < 0) return problem('wetAndTin', 'negative', 'A mass cannot be below zero.')
  if (tin.dryAndTin < 0) return problem('dryAndTin', 'negative', 'A mass cannot be below zero.')
  if (tin.tin < 0) return problem('tin', 'negative', 'A mass cannot be below zero.')
  if (tin.dryAndTin > tin.wetAndTin) {
    return problem('dryAndTin', 'dry-heavier', `Dry is heavier than wet (${mass(tin.wetAndTin)}). Check which is which.`)
  }
  if (tin.tin >= tin.dryAndTin) {
    return problem('tin', 'no-soil', `The tin is as heavy as dry soil and tin (${mass(tin.dryAndTin)}). Check which is which.`)
  }
  if (moistureFromTin(tin) > 500) {
    return problem('dryAndTin', 'moisture-range', 'Moisture comes to more than 500 %. Check the three masses.')
  }
  return []
}
