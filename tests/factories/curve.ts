import { randomUUID } from 'node:crypto'
import type { CreateCurve } from '#shared/schemas/lab.ts'
import { convertDensity } from '#shared/units/density.ts'

/** Points of a curve in pcf as laboratories write them, in kg/m³ as they are sent. */
export function pointsFromPcf(points: readonly (readonly [moisture: number, pcf: number])[]): CreateCurve['points'] {
  return points.map(([moisture, pcf]) => ({ moisture, dryDensity: convertDensity(pcf, 'pcf', 'kg/m3') }))
}

/** What POST …/curves takes: five points over a peak of 120.0 pcf at 12.0 %. */
export function curveInput(overrides: Partial<CreateCurve> & { readonly materialId: string }): CreateCurve {
  const id = randomUUID()
  return {
    id,
    code: `C-${id.slice(0, 4)}`,
    method: 'D698',
    procedure: 'A',
    points: pointsFromPcf([
      [8, 112.8],
      [10, 117.8],
      [12, 120],
      [14, 117.8],
      [16, 112.8],
    ]),
    gs: 2.7,
    gsMeasured: true,
    coarse: null,
    reported: null,
    sampledAt: '2026-03-02T15:00:00.000Z',
    ...overrides,
  }
}
