import type { Calibration } from '#shared/schemas/calibration.ts'
import type { Units } from '#web/lib/units.ts'

export type CalibrationState = 'in-use' | 'out-of-date' | 'void'

/** How a calibration stands at an instant, epoch milliseconds. */
export function calibrationState({ void: voided, validUntil }: Pick<Calibration, 'void' | 'validUntil'>, at: number): CalibrationState {
  if (voided !== null) return 'void'
  return validUntil !== null && Date.parse(validUntil) < at ? 'out-of-date' : 'in-use'
}

/** "In use until Oct 20, 2027". */
export function stateWords({ void: voided, validUntil }: Pick<Calibration, 'void' | 'validUntil'>, at: number, units: Units): string {
  if (voided !== null) return `Void since ${units.fullDate(voided.at)}`
  if (validUntil === null) return 'In use'
  return `${Date.parse(validUntil) < at ? 'Out of date since' : 'In use until'} ${units.fullDate(validUntil)}`
}
