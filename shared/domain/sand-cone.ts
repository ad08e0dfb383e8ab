import type { SandConeSheet } from '#shared/domain/field-sheets.ts'
import { holeFlags, particleProblems } from '#shared/domain/hole-limits.ts'
import { readingProblems } from '#shared/domain/reading-problems.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertMass } from '#shared/units/mass.ts'

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
  return { ok: true, wetDensity, holeVolumeCm3, flags: holeFlags('sand-cone', sheet, holeVolumeCm3) }
}

function sandConeProblems(sheet: SandConeSheet): FieldProblem[] {
  const problems = [
    ...readingProblems([
      { field: 'apparatusBefore', name: 'apparatus and sand before', value: sheet.apparatusBefore, mayBeZero: true },
      { field: 'apparatusAfter', name: 'apparatus and sand after', value: sheet.apparatusAfter, mayBeZero: true },
      { field: 'coneAndPlate', name: 'sand in cone and plate', value: sheet.coneAndPlate, mayBeZero: true },
      { field: 'sandDensity', name: 'bulk density of the sand', value: sheet.sandDensity },
      { field: 'moistSoil', name: 'moist soil from the hole', value: sheet.moistSoil },
    ]),
    ...particleProblems(sheet),
  ]
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
