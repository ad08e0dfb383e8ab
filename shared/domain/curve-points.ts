import { moistureFromTins, tinProblems } from '#shared/domain/moisture.ts'
import type { Tin } from '#shared/domain/moisture.ts'
import { dryDensityOf } from '#shared/domain/phase-relations.ts'
import type { FieldProblem } from '#shared/domain/result.ts'
import { convertMass } from '#shared/units/mass.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { VolumeUnit } from '#shared/units/volume.ts'

/** A point of a laboratory compaction curve: percent and kg/m³. */
export type LabPoint = { readonly moisture: number; readonly dryDensity: number }

/** One compacted specimen as weighed: masses in the sheet's unit, and its moisture as tins or as a percentage. */
export type CompactedSpecimen = {
  readonly mouldAndSoil: number
  readonly mould: number
  readonly moisture: { readonly tins: readonly Tin[] } | { readonly percent: number }
}

/** The laboratory sheet of D698, D1557, T 99 or T 180. */
export type CompactionSheet = {
  readonly massUnit: MassUnit
  readonly mouldVolume: number
  readonly volumeUnit: VolumeUnit
  readonly specimens: readonly CompactedSpecimen[]
}

/** A point with the wet density it came from, kg/m³. */
export type WeighedPoint = LabPoint & { readonly wetDensity: number }

export type CurvePointsResult =
  | { readonly ok: true; readonly points: readonly WeighedPoint[] }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] }

/**
 * Reduces the weighings of a compaction test: wet density from the soil in the mould over its volume, moisture as the
 * mean of the tins, dry density from both (D698 calculation section).
 * @returns points in the order given, kg/m³ and percent; or what is wrong with which field
 */
export function curvePointsFromMasses(sheet: CompactionSheet): CurvePointsResult {
  const problems: FieldProblem[] = []
  if (!(Number.isFinite(sheet.mouldVolume) && sheet.mouldVolume > 0)) {
    problems.push({ field: 'mouldVolume', code: 'not-positive', message: 'The volume of the mould must be above zero.' })
  }
  const volume = convertVolume(sheet.mouldVolume, sheet.volumeUnit, 'cm3')
  const points = sheet.specimens.map((specimen, i) => {
    problems.push(...specimenProblems(specimen, `specimens.${i}`))
    const moisture = 'percent' in specimen.moisture ? specimen.moisture.percent : moistureFromTins(specimen.moisture.tins)
    const grams = convertMass(specimen.mouldAndSoil - specimen.mould, sheet.massUnit, 'g')
    const wetDensity = (1000 * grams) / volume
    return { moisture, wetDensity, dryDensity: dryDensityOf(wetDensity, moisture) }
  })
  return problems.length > 0 ? { ok: false, problems } : { ok: true, points }
}

function specimenProblems(specimen: CompactedSpecimen, path: string): FieldProblem[] {
  const problems: FieldProblem[] = []
  const { mouldAndSoil, mould, moisture } = specimen
  if (!Number.isFinite(mouldAndSoil)) {
    problems.push({ field: `${path}.mouldAndSoil`, code: 'missing', message: 'Enter the mass of mould and soil.' })
  } else if (!(Number.isFinite(mould) && mould >= 0)) {
    problems.push({ field: `${path}.mould`, code: 'missing', message: 'Enter the mass of the empty mould, zero or more.' })
  } else if (mouldAndSoil <= mould) {
    problems.push({
      field: `${path}.mouldAndSoil`,
      code: 'no-soil',
      message: `Mould and soil is no heavier than the mould (${mould}). Check which is which.`,
    })
  }
  if ('percent' in moisture) {
    if (!(Number.isFinite(moisture.percent) && moisture.percent >= 0 && moisture.percent <= 500)) {
      problems.push({ field: `${path}.moisture`, code: 'moisture-range', message: 'Moisture is a percentage of the dry mass, 0 to 500.' })
    }
    return problems
  }
  if (moisture.tins.length === 0) {
    problems.push({ field: `${path}.moisture`, code: 'missing', message: 'Enter at least one moisture tin.' })
  }
  moisture.tins.forEach((tin, i) => problems.push(...tinProblems(tin, `${path}.moisture.tins.${i}`, '')))
  return problems
}
