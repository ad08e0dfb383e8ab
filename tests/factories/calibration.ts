import { randomUUID } from 'node:crypto'
import type { CreateCalibration } from '#shared/schemas/calibration.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'

/** What POST …/calibrations takes: a sand of 1.418 g/cm³, three trials in a litre, a minute before the tests. */
export function calibrationInput(overrides: Partial<CreateCalibration> = {}): CreateCalibration {
  return {
    id: randomUUID(),
    apparatus: 'Sand, batch 4',
    sheet: { kind: 'sand-density', massUnit: 'g', volumeUnit: 'cm3', containerVolume: 1000, container: 300, filled: [1717, 1718, 1719] },
    performedAt: new Date(Date.now() - 3_600_000).toISOString(),
    validUntil: null,
    remarks: '',
    ...overrides,
  }
}

/** What a cone of 1,548 g of sand reads over the small site's passing ground: 117.6 pcf dry at 12.0 % in a hole of 2,158 cm³. */
export function coneSheet(calibrationIds: readonly string[] = [], change: { readonly sandDensity?: number } = {}): CreateTest['sheet'] {
  return {
    method: 'sand-cone',
    massUnit: 'g',
    apparatusBefore: 7612,
    apparatusAfter: 3004,
    coneAndPlate: 1548,
    densityUnit: 'g/cm3',
    sandDensity: 1.418,
    moistSoil: 4553,
    calibrationIds: [...calibrationIds],
    moisture: { method: 'stated', percent: 12 },
    ...change,
  }
}
