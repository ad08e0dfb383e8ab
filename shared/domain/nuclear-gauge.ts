import type { NuclearGaugeSheet, StandardCounts } from '#shared/domain/field-sheets.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'
import { DRIFT_LIMITS } from '#shared/domain/standard-count.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertLength } from '#shared/units/length.ts'

/** Range that gauges are calibrated for, pcf, as manuals quote it; rods reach 300 mm. */
const CALIBRATED_PCF = { low: 70, high: 170 } as const
const LONGEST_ROD_MM = 305

/**
 * The wet density by the nuclear gauge (D6938, T 310): the reading, or the mean of two.
 * @returns kg/m³ with flags, or what is wrong with which field
 */
export function reduceNuclearGauge(
  sheet: NuclearGaugeSheet,
): { ok: true; wetDensity: number; flags: Reason[] } | { ok: false; problems: FieldProblem[] } {
  const problems: FieldProblem[] = []
  const positive = (field: string, value: number, name: string) => {
    if (!Number.isFinite(value)) problems.push({ field, code: 'missing', message: `Enter the ${name}.` })
    else if (value <= 0) problems.push({ field, code: 'not-positive', message: `The ${name} must be above zero.` })
  }
  positive('wetDensity', sheet.wetDensity, 'wet density')
  if (sheet.secondWetDensity !== undefined) positive('secondWetDensity', sheet.secondWetDensity, 'second wet density')
  if (!(Number.isFinite(sheet.rodDepth) && sheet.rodDepth >= 0)) {
    problems.push({ field: 'rodDepth', code: 'missing', message: 'Enter the depth of the rod, 0 in backscatter.' })
  } else if (sheet.mode === 'direct-transmission' && sheet.rodDepth === 0) {
    problems.push({ field: 'rodDepth', code: 'not-positive', message: 'In direct transmission the rod has a depth above zero.' })
  }
  const counts = sheet.standardCounts
  if (counts) {
    positive('standardCounts.density', counts.density, 'density standard count')
    positive('standardCounts.moisture', counts.moisture, 'moisture standard count')
    if (counts.referenceDensity !== undefined) positive('standardCounts.referenceDensity', counts.referenceDensity, 'reference density count')
    if (counts.referenceMoisture !== undefined) positive('standardCounts.referenceMoisture', counts.referenceMoisture, 'reference moisture count')
  }
  if (problems.length > 0) return { ok: false, problems }

  const readings = sheet.secondWetDensity === undefined ? [sheet.wetDensity] : [sheet.wetDensity, sheet.secondWetDensity]
  const mean = readings.reduce((sum, reading) => sum + reading, 0) / readings.length
  const wetDensity = convertDensity(mean, sheet.densityUnit, 'kg/m3')
  const flags = counts ? standardCountFlags(counts) : []
  const pcf = convertDensity(wetDensity, 'kg/m3', 'pcf')
  if (pcf < CALIBRATED_PCF.low || pcf > CALIBRATED_PCF.high) {
    flags.push({ code: 'outside-calibration', message: `Gauges are calibrated from ${CALIBRATED_PCF.low} to ${CALIBRATED_PCF.high}\u2009pcf wet; this is ${pcf.toFixed(1)}.` })
  }
  if (convertLength(sheet.rodDepth, sheet.lengthUnit, 'mm') > LONGEST_ROD_MM) {
    flags.push({ code: 'rod-depth', message: 'Rods reach 300\u2009mm (12\u2009in). Check the depth.' })
  }
  if (sheet.mode === 'backscatter' && sheet.moisture.method === 'gauge' && sheet.moisture.wall !== undefined) {
    flags.push({ code: 'wall-backscatter', message: 'Beside a wall a backscatter density is affected too; only direct transmission is not.' })
  }
  return { ok: true, wetDensity, flags }
}

/**
 * Compares the day's standard counts with their reference: 1 % on density, 2 % on moisture (gauge manuals and agency
 * forms; D6938 asks for the same log).
 * @param counts above zero; a reference that is left out is not compared
 * @returns a flag for each count that has drifted
 */
export function standardCountFlags(counts: StandardCounts): Reason[] {
  const rows = [
    ['density', counts.density, counts.referenceDensity, DRIFT_LIMITS.density],
    ['moisture', counts.moisture, counts.referenceMoisture, DRIFT_LIMITS.moisture],
  ] as const
  return rows.flatMap(([name, count, reference, allowed]) => {
    if (reference === undefined) return []
    const drift = (100 * Math.abs(count - reference)) / reference
    if (settle(drift) <= allowed) return []
    const far = drift < 1000 ? `${drift.toFixed(1)} %` : 'far'
    return [{ code: `standard-count-${name}`, message: `The ${name} standard count is ${far} from its reference; ${allowed} % is allowed.` }]
  })
}
