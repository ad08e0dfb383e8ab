import type { LabPoint } from '#shared/domain/curve-points.ts'
import { moistureFromTins, tinProblems } from '#shared/domain/moisture.ts'
import type { Tin } from '#shared/domain/moisture.ts'
import { dryDensityOf } from '#shared/domain/phase-relations.ts'
import { readingProblems } from '#shared/domain/reading-problems.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { convertDensity } from '#shared/units/density.ts'
import type { DensityUnit } from '#shared/units/density.ts'
import { convertMass } from '#shared/units/mass.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { VolumeUnit } from '#shared/units/volume.ts'

/** Moisture of a specimen: stated, or by one tin or two (top and bottom), which are averaged. */
export type SpecimenMoisture = { readonly percent: number } | { readonly massUnit: MassUnit; readonly tins: readonly Tin[] }

/** The specimens of a curve as the laboratory wrote them down. */
export type CurveEntry =
  | {
      readonly kind: 'masses'
      readonly massUnit: MassUnit
      readonly volumeUnit: VolumeUnit
      readonly mould: number
      readonly mouldVolume: number
      readonly specimens: readonly { readonly mouldAndSoil: number; readonly moisture: SpecimenMoisture }[]
    }
  | { readonly kind: 'wet'; readonly densityUnit: DensityUnit; readonly specimens: readonly { readonly density: number; readonly moisture: SpecimenMoisture }[] }
  | {
      readonly kind: 'dry'
      readonly densityUnit: DensityUnit
      /** `wetDensity` where the sheet states it too, to catch one that does not belong to the other */
      readonly specimens: readonly { readonly density: number; readonly wetDensity?: number | undefined; readonly moisture: SpecimenMoisture }[]
    }

export type ReducedEntry =
  | { readonly ok: true; readonly points: readonly LabPoint[]; readonly flags: readonly (Reason & { readonly specimen: number })[] }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] }

/** A dry density on a sheet may be rounded, but not by more than this share of what its wet density and moisture give. */
const STATED_TOLERANCE = 0.005

/**
 * Reduces a laboratory's specimens to points of a curve (D698, D1557, T 99, T 180, calculation): wet density = (mould and soil −
 * mould) / volume of the mould, dry density = wet / (1 + w).
 * @param entry values in the units named beside them
 * @returns percent and kg/m³, unrounded, in the order entered; or every problem with its field, such as `specimens.2.mouldAndSoil`
 */
export function reduceEntry(entry: CurveEntry): ReducedEntry {
  const problems = [...apparatusProblems(entry), ...entry.specimens.flatMap((specimen, i) => specimenProblems(entry, specimen, `specimens.${i}`))]
  if (problems.length > 0) return { ok: false, problems }
  const points = entry.specimens.map((specimen) => {
    const moisture = moistureOf(specimen.moisture)
    return { moisture, dryDensity: dryDensity(entry, specimen, moisture) }
  })
  return { ok: true, points, flags: statedFlags(entry) }
}

type Specimen = CurveEntry['specimens'][number]

function moistureOf(moisture: SpecimenMoisture): number {
  return 'percent' in moisture ? moisture.percent : moistureFromTins(moisture.tins)
}

function dryDensity(entry: CurveEntry, specimen: Specimen, moisture: number): number {
  if (entry.kind === 'masses') {
    const soil = 'mouldAndSoil' in specimen ? specimen.mouldAndSoil - entry.mould : Number.NaN
    return dryDensityOf((1000 * convertMass(soil, entry.massUnit, 'g')) / convertVolume(entry.mouldVolume, entry.volumeUnit, 'cm3'), moisture)
  }
  const density = convertDensity('density' in specimen ? specimen.density : Number.NaN, entry.densityUnit, 'kg/m3')
  return entry.kind === 'wet' ? dryDensityOf(density, moisture) : density
}

function apparatusProblems(entry: CurveEntry): FieldProblem[] {
  if (entry.kind !== 'masses') return []
  return readingProblems([
    { field: 'mould', name: 'mass of the empty mould', value: entry.mould, mayBeZero: true },
    { field: 'mouldVolume', name: 'volume of the mould', value: entry.mouldVolume },
  ])
}

function specimenProblems(entry: CurveEntry, specimen: Specimen, path: string): FieldProblem[] {
  const problems: FieldProblem[] = []
  if ('mouldAndSoil' in specimen) {
    problems.push(...readingProblems([{ field: `${path}.mouldAndSoil`, name: 'mass of mould and soil', value: specimen.mouldAndSoil }]))
    if (problems.length === 0 && entry.kind === 'masses' && specimen.mouldAndSoil <= entry.mould) {
      problems.push({ field: `${path}.mouldAndSoil`, code: 'no-soil', message: `Mould and soil is no heavier than the mould (${entry.mould}\u2009${entry.massUnit}). Check which is which.` })
    }
  } else {
    problems.push(...readingProblems([{ field: `${path}.density`, name: `${entry.kind === 'wet' ? 'wet' : 'dry'} density`, value: specimen.density }]))
    if ('wetDensity' in specimen && specimen.wetDensity !== undefined) {
      problems.push(...readingProblems([{ field: `${path}.wetDensity`, name: 'wet density', value: specimen.wetDensity }]))
    }
  }
  return [...problems, ...moistureProblems(specimen.moisture, `${path}.moisture`)]
}

function moistureProblems(moisture: SpecimenMoisture, path: string): FieldProblem[] {
  if (!('percent' in moisture)) {
    if (moisture.tins.length === 0) return [{ field: `${path}.tins.0.wetAndTin`, code: 'missing', message: 'Enter the moisture.' }]
    return moisture.tins.flatMap((tin, i) => tinProblems(tin, `${path}.tins.${i}`, moisture.massUnit))
  }
  const { percent } = moisture
  if (!Number.isFinite(percent)) return [{ field: `${path}.percent`, code: 'missing', message: 'Enter the moisture.' }]
  if (percent < 0 || percent > 200) return [{ field: `${path}.percent`, code: 'moisture-range', message: 'Moisture is a percentage of the dry mass, 0 to 200.' }]
  return []
}

/** Where a sheet states wet and dry density, and the two do not belong together at its moisture. */
function statedFlags(entry: CurveEntry): (Reason & { readonly specimen: number })[] {
  if (entry.kind !== 'dry') return []
  return entry.specimens.flatMap(({ density, wetDensity, moisture }, specimen) => {
    if (wetDensity === undefined) return []
    const worked = dryDensityOf(wetDensity, moistureOf(moisture))
    if (Math.abs(density - worked) <= STATED_TOLERANCE * worked) return []
    return [{ specimen, code: 'stated-dry-off', message: `Specimen ${specimen + 1}: the wet density and moisture give ${Number(worked.toPrecision(4))} dry, the sheet states ${density}. Check which is right.` }]
  })
}
