import type { CalibrationKind } from '#shared/domain/calibration.ts'
import type { RawSheet } from '#shared/domain/field-sheets.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertMass } from '#shared/units/mass.ts'
import { convertVolume } from '#shared/units/volume.ts'

/** A calibration as a sheet takes it: what it is of, and its value (CalibrationResult.value). */
export type CalibratedValue = { readonly kind: CalibrationKind; readonly value: number }

export type CalibratedReading = {
  /** the field of the sheet that carries the value; null where it only vouches for the apparatus (balloon) */
  readonly field: 'sandDensity' | 'coneAndPlate' | 'volume' | null
  /** the calibrated value in the sheet's unit */
  readonly value: number
  /** the sheet carries another value, by more than rounding does */
  readonly differs: boolean
}

/** A value copied from a calibration may be rounded, but by no more than this share. */
const ROUNDING = 0.001

/**
 * What a calibration gives to a sheet.
 * @returns the field with the value in the sheet's own unit; null where the calibration is not of the sheet's method
 */
export function calibratedReading(sheet: RawSheet, { kind, value }: CalibratedValue): CalibratedReading | null {
  if (sheet.method === 'sand-cone' && kind === 'sand-density') return reading('sandDensity', convertDensity(value, 'kg/m3', sheet.densityUnit), sheet.sandDensity)
  if (sheet.method === 'sand-cone' && kind === 'cone') return reading('coneAndPlate', convertMass(value, 'g', sheet.massUnit), sheet.coneAndPlate)
  if (sheet.method === 'drive-cylinder' && kind === 'cylinder') {
    const stated = sheet.volumeBy === 'stated' ? sheet.volume : undefined
    return reading('volume', convertVolume(value, 'cm3', sheet.volumeUnit), stated)
  }
  if (sheet.method === 'rubber-balloon' && kind === 'balloon') return { field: null, value, differs: false }
  return null
}

function reading(field: CalibratedReading['field'], value: number, carried: number | undefined): CalibratedReading {
  return { field, value, differs: !(carried !== undefined && Math.abs(carried - value) <= ROUNDING * value) }
}
