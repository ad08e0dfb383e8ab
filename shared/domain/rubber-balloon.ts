import type { RubberBalloonSheet } from '#shared/domain/field-sheets.ts'
import { holeFlags, particleProblems } from '#shared/domain/hole-limits.ts'
import { readingProblems } from '#shared/domain/reading-problems.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { convertMass } from '#shared/units/mass.ts'
import { convertVolume } from '#shared/units/volume.ts'

/**
 * The hole and its wet density by the rubber balloon (D2167): volume = the indicator's reading with the balloon in the hole
 * less its reading on the plate before; wet density = moist soil over volume.
 * @returns kg/m³ and cm³ with flags, or what is wrong with which field
 */
export function reduceRubberBalloon(
  sheet: RubberBalloonSheet,
): { ok: true; wetDensity: number; holeVolumeCm3: number; flags: Reason[] } | { ok: false; problems: FieldProblem[] } {
  const { volumeBefore, volumeAfter, volumeUnit, moistSoil, massUnit } = sheet
  const problems = [
    ...readingProblems([
      { field: 'volumeBefore', name: 'reading before the hole', value: volumeBefore, mayBeZero: true },
      { field: 'volumeAfter', name: 'reading in the hole', value: volumeAfter },
      { field: 'moistSoil', name: 'moist soil from the hole', value: moistSoil },
    ]),
    ...particleProblems(sheet),
  ]
  if (problems.length === 0 && volumeAfter <= volumeBefore) {
    problems.push({ field: 'volumeAfter', code: 'no-hole', message: 'The reading in the hole is not above the one before: there is no hole. Check which is which.' })
  }
  if (problems.length > 0) return { ok: false, problems }
  const holeVolumeCm3 = convertVolume(volumeAfter - volumeBefore, volumeUnit, 'cm3')
  const wetDensity = (1000 * convertMass(moistSoil, massUnit, 'g')) / holeVolumeCm3
  return { ok: true, wetDensity, holeVolumeCm3, flags: holeFlags('rubber-balloon', sheet, holeVolumeCm3) }
}
