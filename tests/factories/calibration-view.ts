import type { Calibration } from '#shared/schemas/calibration.ts'

/** A calibration as the register lists it: a sand of 1.418 g/cm³ in three trials, no end set. */
export function buildCalibration(overrides: Partial<Calibration> = {}): Calibration {
  return {
    id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d41',
    apparatus: 'Sand, batch 4',
    sheet: { kind: 'sand-density', massUnit: 'g', volumeUnit: 'cm3', containerVolume: 1000, container: 300, filled: [1717, 1718, 1719] },
    value: 1418,
    spreadPercent: 0.0705,
    flags: [],
    performedAt: '2026-11-02T16:00:00.000Z',
    validUntil: null,
    remarks: '',
    recordedBy: { id: '4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', name: 'Milan Petrak' },
    recordedAt: '2026-11-02T16:05:00.000Z',
    void: null,
    ...overrides,
  }
}
