import type { DriveCylinderSheet } from '#shared/domain/field-sheets.ts'
import { particleProblems } from '#shared/domain/hole-limits.ts'
import { readingProblems } from '#shared/domain/reading-problems.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { convertLength } from '#shared/units/length.ts'
import { convertMass } from '#shared/units/mass.ts'
import { convertVolume } from '#shared/units/volume.ts'

/** Soil with particles above the No. 4 sieve is outside the method (D2937 scope). */
const GREATEST_PARTICLE_MM = 4.75

/**
 * Volume of a cylinder: V = π·D²·L / 4.
 * @param diameterMm, heightMm inner, above zero
 * @returns cm³
 */
export function cylinderVolumeCm3(diameterMm: number, heightMm: number): number {
  return (Math.PI * diameterMm * diameterMm * heightMm) / 4000
}

/**
 * Wet density by the drive cylinder (D2937): moist soil in the cylinder over its volume, which is stated (from its
 * calibration) or measured at the ring.
 * @returns kg/m³ and cm³ with flags, or what is wrong with which field
 */
export function reduceDriveCylinder(
  sheet: DriveCylinderSheet,
): { ok: true; wetDensity: number; holeVolumeCm3: number; flags: Reason[] } | { ok: false; problems: FieldProblem[] } {
  const { cylinderAndSoil, cylinder, massUnit } = sheet
  const problems = [
    ...readingProblems([
      { field: 'cylinderAndSoil', name: 'mass of cylinder and moist soil', value: cylinderAndSoil },
      { field: 'cylinder', name: 'mass of the cylinder', value: cylinder },
      ...(sheet.volumeBy === 'stated'
        ? [{ field: 'volume', name: 'volume of the cylinder', value: sheet.volume }]
        : [
            { field: 'diameter', name: 'inner diameter of the cylinder', value: sheet.diameter },
            { field: 'height', name: 'height of the cylinder', value: sheet.height },
          ]),
    ]),
    ...particleProblems(sheet),
  ]
  if (problems.length === 0 && cylinderAndSoil <= cylinder) {
    problems.push({ field: 'cylinder', code: 'no-soil', message: 'The cylinder is as heavy as cylinder and soil. Check which is which.' })
  }
  if (problems.length > 0) return { ok: false, problems }
  const holeVolumeCm3 = volumeOf(sheet)
  const wetDensity = (1000 * (convertMass(cylinderAndSoil, massUnit, 'g') - convertMass(cylinder, massUnit, 'g'))) / holeVolumeCm3
  return { ok: true, wetDensity, holeVolumeCm3, flags: flagsOf(sheet) }
}

function volumeOf(sheet: DriveCylinderSheet): number {
  if (sheet.volumeBy === 'stated') return convertVolume(sheet.volume ?? 0, sheet.volumeUnit, 'cm3')
  const mm = (length: number | undefined) => convertLength(length ?? 0, sheet.lengthUnit, 'mm')
  return cylinderVolumeCm3(mm(sheet.diameter), mm(sheet.height))
}

function flagsOf({ largestParticle, lengthUnit }: DriveCylinderSheet): Reason[] {
  if (largestParticle === undefined || convertLength(largestParticle, lengthUnit, 'mm') <= GREATEST_PARTICLE_MM + 1e-9) return []
  return [{ code: 'cylinder-gravel', message: `Particles above ${GREATEST_PARTICLE_MM}\u2009mm (No. 4) are outside D2937. Use a method that digs a hole.` }]
}
