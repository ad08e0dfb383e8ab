import type { SandConeSheet } from '#shared/domain/field-sheets.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertLength } from '#shared/units/length.ts'
import { convertMass } from '#shared/units/mass.ts'

/** Above this the method gives way to the larger-hole methods (D1556 scope: 0.1 ft³, 2830 cm³; particles 1½ in). */
const GREATEST_HOLE_CM3 = 2830
const GREATEST_PARTICLE_MM = 38.1

/** Least hole volume, cm³, for the largest particle, mm, after the table of D1556. */
const LEAST_HOLE = [
  { particleMm: 12.7, cm3: 1415 },
  { particleMm: 25.4, cm3: 2125 },
  { particleMm: GREATEST_PARTICLE_MM, cm3: 2830 },
] as const

/**
 * The hole and its wet density by the sand cone (D1556, T 191): sand in the hole = before − after − cone and plate;
 * volume = that over the sand's density; wet density = moist soil over volume. The volume is not rounded on the way.
 * @returns kg/m³ and cm³ with flags, or what is wrong with which field
 */
export function reduceSandCone(
  sheet: SandConeSheet,
):
  | { ok: true; wetDensity: number; holeVolumeCm3: number; flags: Reason[] }
  | { ok: false; problems: FieldProblem[] } {
  const problems = sandConeProblems(sheet)
  if (problems.length > 0) return { ok: false, problems }
  const grams = (value: number) => convertMass(value, sheet.massUnit, 'g')
  const sandInHole = grams(sheet.apparatusBefore) - grams(sheet.apparatusAfter) - grams(sheet.coneAndPlate)
  const holeVolumeCm3 = sandInHole / convertDensity(sheet.sandDensity, sheet.densityUnit, 'g/cm3')
  const wetDensity = (1000 * grams(sheet.moistSoil)) / holeVolumeCm3
  return { ok: true, wetDensity, holeVolumeCm3, flags: holeFlags(sheet, holeVolumeCm3) }
}

const FIELDS = [
  ['apparatusBefore', 'apparatus and sand before'],
  ['apparatusAfter', 'apparatus and sand after'],
  ['coneAndPlate', 'sand in cone and plate'],
  ['sandDensity', 'bulk density of the sand'],
  ['moistSoil', 'moist soil from the hole'],
] as const

function sandConeProblems(sheet: SandConeSheet): FieldProblem[] {
  const problems: FieldProblem[] = []
  for (const [field, name] of FIELDS) {
    const value = sheet[field]
    if (!Number.isFinite(value)) problems.push({ field, code: 'missing', message: `Enter the ${name}.` })
    else if (value < 0) problems.push({ field, code: 'negative', message: `The ${name} cannot be below zero.` })
    else if (value === 0 && (field === 'sandDensity' || field === 'moistSoil')) {
      problems.push({ field, code: 'not-positive', message: `The ${name} must be above zero.` })
    }
  }
  if (sheet.largestParticle !== undefined && !(sheet.largestParticle >= 0 && Number.isFinite(sheet.largestParticle))) {
    problems.push({ field: 'largestParticle', code: 'negative', message: 'The largest particle must be zero or more, or left out.' })
  }
  if (problems.length > 0) return problems

  const { apparatusBefore, apparatusAfter, coneAndPlate, massUnit } = sheet
  if (apparatusAfter >= apparatusBefore) {
    return [{
      field: 'apparatusAfter',
      code: 'no-sand-used',
      message: `After is as heavy as before (${apparatusBefore}\u2009${massUnit}). Check which is which.`,
    }]
  }
  if (apparatusBefore - apparatusAfter <= coneAndPlate) {
    return [{ field: 'coneAndPlate', code: 'no-hole', message: 'The cone and plate take all of the sand used: nothing is left for the hole. Check the three masses.' }]
  }
  const sand = convertDensity(sheet.sandDensity, sheet.densityUnit, 'g/cm3')
  if (sand < 0.8 || sand > 2.5) {
    return [{
      field: 'sandDensity',
      code: 'density-range',
      message: 'Dry sand pours at 1.3 to 1.7\u2009g/cm³ (80 to 106\u2009pcf). Check the value and its unit.',
    }]
  }
  return []
}

function holeFlags(sheet: SandConeSheet, holeVolumeCm3: number): Reason[] {
  const flags: Reason[] = []
  const particleMm =
    sheet.largestParticle === undefined ? 0 : convertLength(sheet.largestParticle, sheet.lengthUnit ?? 'mm', 'mm')
  const least = LEAST_HOLE.find((row) => particleMm <= row.particleMm + 1e-9) ?? LEAST_HOLE[2]
  const size = `${Math.round(holeVolumeCm3)}\u2009cm³`
  if (particleMm > GREATEST_PARTICLE_MM + 1e-9) {
    flags.push({ code: 'particle-large', message: 'Particles above 38\u2009mm (1½\u2009in) are outside D1556. Use a method for larger holes.' })
  }
  if (holeVolumeCm3 < least.cm3) {
    flags.push({ code: 'hole-small', message: `The hole (${size}) is smaller than D1556 advises for this particle size (${least.cm3}\u2009cm³).` })
  }
  if (holeVolumeCm3 > GREATEST_HOLE_CM3 * 1.001) {
    flags.push({ code: 'hole-large', message: `The hole (${size}) is larger than D1556 covers (${GREATEST_HOLE_CM3}\u2009cm³).` })
  }
  return flags
}
