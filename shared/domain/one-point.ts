import type { TinMoistureSheet, CarbideMoistureSheet, StatedMoistureSheet } from '#shared/domain/field-sheets.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import type { FieldProblem } from '#shared/domain/result.ts'
import type { DensityUnit } from '#shared/units/density.ts'
import { convertMass } from '#shared/units/mass.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { VolumeUnit } from '#shared/units/volume.ts'

export type OnePointMoisture = TinMoistureSheet | CarbideMoistureSheet | StatedMoistureSheet

/** One specimen compacted in the mould, as weighed or as its wet density was worked out. */
export type OnePointSheet =
  | {
      readonly kind: 'mould'
      readonly massUnit: MassUnit
      readonly mouldAndSoil: number
      readonly mould: number
      readonly mouldVolume: number
      readonly volumeUnit: VolumeUnit
      readonly moisture: OnePointMoisture
    }
  | { readonly kind: 'density'; readonly densityUnit: DensityUnit; readonly wetDensity: number; readonly moisture: OnePointMoisture }

export type ReducedOnePoint =
  | { readonly ok: true; readonly wetDensity: number; readonly dryDensity: number; readonly moisture: number }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] }

/**
 * Reduces a one-point: wet density from the soil in the mould over its volume, dry density from it and the moisture (AASHTO
 * T 272, calculation as T 99).
 * @param sheet readings in the units named beside them
 * @returns kg/m³ and percent of dry mass; or what is wrong with which field
 */
export function reduceOnePoint(sheet: OnePointSheet): ReducedOnePoint {
  const problems = sheet.kind === 'mould' ? mouldProblems(sheet) : []
  const density =
    sheet.kind === 'density'
      ? { densityUnit: sheet.densityUnit, density: sheet.wetDensity }
      : { densityUnit: 'kg/m3' as const, density: (1000 * convertMass(sheet.mouldAndSoil - sheet.mould, sheet.massUnit, 'g')) / convertVolume(sheet.mouldVolume, sheet.volumeUnit, 'cm3') }
  const reduced = reduceSheet({ method: 'plain', densityIs: 'wet', ...density, moisture: sheet.moisture })
  const densityField = sheet.kind === 'density' ? 'wetDensity' : 'mouldAndSoil'
  const others = reduced.ok ? [] : reduced.problems.filter((problem) => problem.field !== 'density' || problems.length === 0)
  const all = [...problems, ...others.map((problem) => (problem.field === 'density' ? { ...problem, field: densityField } : problem))]
  if (!reduced.ok || all.length > 0) return { ok: false, problems: all }
  return { ok: true, wetDensity: reduced.wetDensity, dryDensity: reduced.dryDensity, moisture: reduced.moisture }
}

function mouldProblems({ mouldAndSoil, mould, mouldVolume }: Extract<OnePointSheet, { kind: 'mould' }>): FieldProblem[] {
  const problems: FieldProblem[] = []
  if (!Number.isFinite(mouldAndSoil)) problems.push({ field: 'mouldAndSoil', code: 'missing', message: 'Enter the mass of mould and soil.' })
  if (!(Number.isFinite(mould) && mould >= 0)) problems.push({ field: 'mould', code: 'missing', message: 'Enter the mass of the empty mould, zero or more.' })
  else if (mouldAndSoil <= mould) problems.push({ field: 'mouldAndSoil', code: 'no-soil', message: `Mould and soil is no heavier than the mould (${mould}). Check which is which.` })
  if (!(Number.isFinite(mouldVolume) && mouldVolume > 0)) problems.push({ field: 'mouldVolume', code: 'not-positive', message: 'The volume of the mould must be above zero.' })
  return problems
}
