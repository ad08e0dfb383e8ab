import type { Curve, Material } from '#shared/schemas/lab.ts'
import { fitReferenceCurve, sampleCurve } from '#shared/domain/reference-curve.ts'
import { convertDensity } from '#shared/units/density.ts'

export const MATERIAL: Material = {
  id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c2001',
  name: 'Ridge borrow',
  source: 'North cut',
  classification: 'Silty sand',
  swellPercent: 25,
  shrinkPercent: 10,
  gs: null,
  gsMeasured: false,
  looseToCompacted: 0.72,
}

export const CURVE_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c2002'
const inPcf = (points: readonly (readonly [moisture: number, pcf: number])[]): Curve['points'] =>
  points.map(([moisture, pcf]) => ({ moisture, dryDensity: convertDensity(pcf, 'pcf', 'kg/m3') }))

const EVEN = inPcf([[8, 112.8], [10, 117.8], [12, 120], [14, 117.8], [16, 112.8]])
/** A sharp curve: the smooth one tops at 131.0 pcf, the quadratic at 130.1. */
export const SHARP = inPcf([[5, 122.1], [7, 127.6], [8.6, 131], [10.2, 128.4], [12.4, 121.5]])

/** A draft curve as the API answers it: 120.0 pcf at 12.0 %. */
export function buildCurve(overrides: Partial<Curve> = {}): Curve {
  const { points = EVEN } = overrides
  const fit = fitReferenceCurve({ points, gs: 2.7, gsMeasured: true })
  if (!fit.ok) throw new Error(fit.reason.message)
  return {
    id: CURVE_ID,
    code: 'RB-3',
    materialId: MATERIAL.id,
    materialName: MATERIAL.name,
    method: 'D698',
    procedure: 'A',
    points,
    entry: null,
    apparatus: null,
    flags: [],
    withdrawReason: null,
    gs: 2.7,
    gsMeasured: true,
    coarse: null,
    reported: null,
    sampledAt: '2026-11-02T16:00:00.000Z',
    status: 'draft',
    fit: {
      spline: fit.spline,
      quadratic: fit.quadratic.ok ? { maxDryDensity: fit.quadratic.maxDryDensity, optimumMoisture: fit.quadratic.optimumMoisture } : null,
      cubic: fit.cubic.ok ? { maxDryDensity: fit.cubic.maxDryDensity, optimumMoisture: fit.cubic.optimumMoisture } : null,
      refusal: null,
      warnings: fit.warnings.map(({ code, message }) => ({ code, message })),
      drawn: sampleCurve(points, 21).map(({ moisture, dryDensity }) => [moisture, dryDensity]),
    },
    pair: fit.spline,
    pairFrom: 'spline',
    approvedBy: null,
    approvedAt: null,
    recordedBy: 'Theo Lindqvist',
    testsJudged: 0,
    superseded: null,
    ...overrides,
  }
}
