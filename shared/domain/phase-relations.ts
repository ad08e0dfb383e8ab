import type { Result } from '#shared/domain/result.ts'

/** Water, kg/m³: the round value of most agencies, and at 20 °C. Every function below takes it as a parameter. */
export const WATER_DENSITY = 1000
export const WATER_DENSITY_20C = 998.2

/**
 * Dry density from wet density and moisture: ρd = ρ / (1 + w).
 * @param wetDensity kg/m³ (any density or unit weight, the result is in the same), above 0
 * @param moisture percent of dry mass, 0 or more
 */
export function dryDensityOf(wetDensity: number, moisture: number): number {
  return wetDensity / (1 + moisture / 100)
}

/**
 * Wet density from dry density and moisture: ρ = ρd (1 + w).
 * @param dryDensity kg/m³ (any density, the result is in the same), above 0
 * @param moisture percent of dry mass, 0 or more
 */
export function wetDensityOf(dryDensity: number, moisture: number): number {
  return dryDensity * (1 + moisture / 100)
}

/**
 * Void ratio e = Gs·ρw/ρd − 1 (Das, Principles of Geotechnical Engineering, ch. 3).
 * @param dryDensity kg/m³, above 0
 * @param gs specific gravity of the solids, above 1
 * @returns voids over solids by volume; 0 or less where the density is that of solid rock or more
 */
export function voidRatio(dryDensity: number, gs: number, waterDensity = WATER_DENSITY): number {
  return (gs * waterDensity) / dryDensity - 1
}

/**
 * Porosity n = e / (1 + e).
 * @param e void ratio, above −1
 */
export function porosity(e: number): number {
  return e / (1 + e)
}

/**
 * Degree of saturation S = w·Gs / (Gs·ρw/ρd − 1). Only the ratio of the densities counts, so no unit can change it.
 * @param dryDensity kg/m³, above 0
 * @param moisture percent of dry mass, 0 or more
 * @returns percent; refused where the density leaves no voids to fill
 */
export function saturation(
  dryDensity: number,
  moisture: number,
  gs: number,
  waterDensity = WATER_DENSITY,
): Result<number> {
  const e = voidRatio(dryDensity, gs, waterDensity)
  if (!(e > 1e-9)) {
    return {
      ok: false,
      reason: { code: 'no-voids', message: 'This density is at least that of the solids themselves: there are no voids to fill.' },
    }
  }
  return { ok: true, value: (moisture * gs) / e }
}

/**
 * Air voids, percent of the total volume: 100 (1 − ρd/(Gs·ρw) − w·ρd/ρw).
 * @param dryDensity kg/m³, above 0
 * @param moisture percent of dry mass, 0 or more
 * @returns percent; negative above the zero-air-voids line
 */
export function airVoids(dryDensity: number, moisture: number, gs: number, waterDensity = WATER_DENSITY): number {
  return 100 * (1 - dryDensity / (gs * waterDensity) - ((moisture / 100) * dryDensity) / waterDensity)
}

/**
 * The line of constant air voids: ρd = Gs·ρw (1 − A) / (1 + w·Gs) (Scott, Soil Mechanics and Foundations).
 * @param moisture percent of dry mass, 0 or more
 * @param airVoidsPercent A, percent of the total volume, 0 to below 100
 * @returns dry density, kg/m³ (or the unit of `waterDensity`)
 */
export function airVoidsLineDensity(
  moisture: number,
  airVoidsPercent: number,
  gs: number,
  waterDensity = WATER_DENSITY,
): number {
  return (gs * waterDensity * (1 - airVoidsPercent / 100)) / (1 + (moisture / 100) * gs)
}

/**
 * Zero air voids: the density no soil at this moisture can pass, ρd = Gs·ρw / (1 + w·Gs).
 * @param moisture percent of dry mass, 0 or more
 * @returns dry density, kg/m³ (or the unit of `waterDensity`)
 */
export function zeroAirVoidsDensity(moisture: number, gs: number, waterDensity = WATER_DENSITY): number {
  return airVoidsLineDensity(moisture, 0, gs, waterDensity)
}

/**
 * The dry density at a degree of saturation: ρd = Gs·ρw / (1 + w·Gs/S).
 * @param moisture percent of dry mass, 0 or more
 * @param saturationPercent above 0
 * @returns dry density, kg/m³ (or the unit of `waterDensity`)
 */
export function saturationLineDensity(
  moisture: number,
  saturationPercent: number,
  gs: number,
  waterDensity = WATER_DENSITY,
): number {
  return (gs * waterDensity) / (1 + (moisture * gs) / saturationPercent)
}

/**
 * Relative density of a granular soil: Dr = (1/ρmin − 1/ρ) / (1/ρmin − 1/ρmax) (D4253 and D4254).
 * @param dryDensity, minimum, maximum in one unit, all above 0, minimum below maximum
 * @returns percent: 0 at the loosest, 100 at the densest
 */
export function relativeDensity(dryDensity: number, minimum: number, maximum: number): Result<number> {
  if (!(minimum > 0 && maximum > minimum && dryDensity > 0)) {
    return { ok: false, reason: { code: 'index-densities', message: 'The minimum must be above zero and below the maximum.' } }
  }
  return { ok: true, value: (100 * (1 / minimum - 1 / dryDensity)) / (1 / minimum - 1 / maximum) }
}
