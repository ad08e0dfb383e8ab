import { stepFor } from '#shared/domain/limits.ts'
import type { Criterion } from '#shared/domain/limits.ts'
import { zeroAirVoidsDensity } from '#shared/domain/phase-relations.ts'
import { parseLimit } from '#shared/domain/rounding.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { convertDensity } from '#shared/units/density.ts'
import type { AcceptedRange, PlotPoint } from '#web/components/drawing/acceptance-window-geometry.ts'
import type { Units } from '#web/lib/units.ts'

/** The reference of a plot: as used for the test, oversize and all. */
export interface PlotReference {
  readonly maxDryDensity: number
  readonly optimumMoisture: number
  readonly gs: number
}

interface PlotInput {
  readonly reference: PlotReference
  /** of the curve before any oversize correction, kg/m³: what steps go by */
  readonly curveMaximum: number
  readonly criteria: readonly Criterion[]
  readonly waterDensity: number
  readonly curve: Pick<Curve, 'points' | 'fit'> | undefined
  readonly units: Units
}

const ZAV_MOISTURES = Array.from({ length: 121 }, (_, step) => step * 0.5)

/** Curve, zero-air-voids line, accepted ground and limit line of a plot, in the site's unit weight. */
export function windowPlot({ reference, curveMaximum, criteria, waterDensity, curve, units }: PlotInput) {
  const unit = units.system === 'us' ? 'pcf' : 'kN/m3'
  const shown = (kgPerM3: number): number => convertDensity(kgPerM3, 'kg/m3', unit)
  const points = (curve?.points ?? []).map(({ moisture, dryDensity }): PlotPoint => ({ moisture, density: shown(dryDensity) }))
  const drawn = (curve?.fit.drawn ?? []).map(([moisture, density]): PlotPoint => ({ moisture, density: shown(density) }))
  const floor = densityFloor(criteria, reference, curveMaximum)
  const lowest = Math.min(...[...points, ...drawn].map((point) => point.density), shown(reference.maxDryDensity) * 0.9)
  const band = criteria.find((criterion) => criterion.kind === 'moisture-band')
  const most = criteria.find((criterion) => criterion.kind === 'rc-max')
  const range: AcceptedRange = {
    moistureMin: band && reference.optimumMoisture + (parseLimit(band.lowText)?.value ?? 0),
    moistureMax: band && reference.optimumMoisture + (parseLimit(band.highText)?.value ?? 0),
    densityMin: floor === null ? lowest : shown(floor.density),
    densityMax: most && shown(((parseLimit(most.text)?.value ?? 0) / 100) * reference.maxDryDensity),
  }
  return {
    densityUnit: units.marks.density,
    curve: drawn,
    curvePoints: points,
    zav: {
      points: ZAV_MOISTURES.map((moisture): PlotPoint => ({ moisture, density: shown(zeroAirVoidsDensity(moisture, reference.gs, waterDensity)) })),
      label: `zero air voids, Gs ${units.number(reference.gs, 2)}`,
    },
    accepted: range,
    limit: floor === null ? undefined : { density: shown(floor.density), label: floor.percent === null ? `at least ${units.densityNumber(floor.density)}` : `${floor.percent} % of ${units.densityNumber(reference.maxDryDensity)}` },
  }
}

interface Floor {
  readonly density: number
  /** the limit as written, where it is one of compaction */
  readonly percent: string | null
}

/** The highest of the least densities asked for, kg/m³. */
function densityFloor(criteria: readonly Criterion[], reference: PlotReference, curveMaximum: number): Floor | null {
  const floors = criteria.map((criterion) => floorOf(criterion, reference, curveMaximum)).filter((floor) => floor !== null)
  return floors.reduce<Floor | null>((highest, floor) => (highest === null || floor.density > highest.density ? floor : highest), null)
}

function floorOf(criterion: Criterion, reference: PlotReference, curveMaximum: number): Floor | null {
  if (criterion.kind === 'dry-density-min') {
    const limit = parseLimit(criterion.text)
    return limit && { density: convertDensity(limit.value, criterion.unit, 'kg/m3'), percent: null }
  }
  if (criterion.kind !== 'rc-min' && criterion.kind !== 'rc-min-steps') return null
  const text = criterion.kind === 'rc-min' ? criterion.text : stepFor(criterion.steps, curveMaximum)
  const limit = text === undefined ? null : parseLimit(text)
  return limit && text !== undefined ? { density: (limit.value / 100) * reference.maxDryDensity, percent: text } : null
}
