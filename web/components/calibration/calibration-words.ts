import type { CalibrationKind } from '#shared/domain/calibration.ts'
import { convertDensity } from '#shared/units/density.ts'
import { THIN_SPACE } from '#shared/units/format.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { Units } from '#web/lib/units.ts'

/** What a calibration came to, as it is read on the apparatus: "1.418 g/cm³", "1,548 g". */
export function calibrationWords(kind: CalibrationKind, value: number, units: Pick<Units, 'number'>): string {
  switch (kind) {
    case 'sand-density':
      return `${units.number(convertDensity(value, 'kg/m3', 'g/cm3'), 4)}${THIN_SPACE}g/cm³ (${units.number(convertDensity(value, 'kg/m3', 'pcf'), 2)}${THIN_SPACE}pcf)`
    case 'cone':
      return `${units.number(value, 1)}${THIN_SPACE}g`
    case 'cylinder':
      return `${units.number(value, 1)}${THIN_SPACE}cm³ (${units.number(convertVolume(value, 'cm3', 'ft3'), 5)}${THIN_SPACE}ft³)`
    case 'balloon':
      return `reads ${units.number(Math.abs(value), 2)}${THIN_SPACE}% ${value < 0 ? 'low' : 'high'}`
  }
}
