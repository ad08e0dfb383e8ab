import type { Criterion } from '#shared/domain/limits.ts'
import { stepFor } from '#shared/domain/limits.ts'
import { zeroAirVoidsDensity } from '#shared/domain/phase-relations.ts'
import { parseLimit } from '#shared/domain/rounding.ts'
import type { Column } from '#shared/schemas/ground.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import type { UnitSystem } from '#shared/units/format.ts'
import { convertDensity } from '#shared/units/density.ts'
import type { AcceptedRange, PlotPoint } from '#web/components/drawing/acceptance-window-geometry.ts'
import type { AcceptanceWindowProps, PlottedTest } from '#web/components/drawing/acceptance-window.tsx'

const ZAV_STEPS = 60

/** The curve the cell's newest result was judged against; without one, the approved curve of its top lift's material. */
export function curveInForce(column: Column, curves: readonly Curve[]): Curve | undefined {
  const tested = column.rows.find((row) => row.test !== null)?.test
  const byTest = curves.find((curve) => curve.id === tested?.curveId)
  if (byTest !== undefined) return byTest
  const material = column.rows.find((row) => row.materialName !== null)?.materialName
  return curves.find((curve) => curve.status === 'approved' && curve.materialName === material)
}

/** Least density that is accepted, kg/m³: the highest of the minima the specification names. */
function densityMin(criteria: readonly Criterion[], maxDry: number): number | undefined {
  const percents = criteria.flatMap((criterion) => {
    if (criterion.kind === 'rc-min') return parseLimit(criterion.text)?.value ?? []
    if (criterion.kind === 'rc-min-steps') return parseLimit(stepFor(criterion.steps, maxDry) ?? '')?.value ?? []
    return []
  })
  const plain = criteria.flatMap((criterion) => {
    const limit = criterion.kind === 'dry-density-min' ? parseLimit(criterion.text) : null
    return criterion.kind === 'dry-density-min' && limit !== null ? convertDensity(limit.value, criterion.unit, 'kg/m3') : []
  })
  const all = [...percents.map((percent) => (percent / 100) * maxDry), ...plain]
  return all.length === 0 ? undefined : Math.max(...all)
}

/** The window of the specification on a curve, kg/m³; undefined where no least density is asked for. */
export function acceptedRange(criteria: readonly Criterion[], pair: NonNullable<Curve['pair']>): AcceptedRange | undefined {
  const least = densityMin(criteria, pair.maxDryDensity)
  if (least === undefined) return undefined
  const band = criteria.find((criterion) => criterion.kind === 'moisture-band')
  const low = band === undefined ? null : parseLimit(band.lowText)
  const high = band === undefined ? null : parseLimit(band.highText)
  return {
    densityMin: least,
    moistureMin: low === null ? undefined : pair.optimumMoisture + low.value,
    moistureMax: high === null ? undefined : pair.optimumMoisture + high.value,
  }
}

function plotted(column: Column, density: (kgM3: number) => number): PlottedTest[] {
  const tests = new Map<string, PlottedTest>()
  for (const { test } of column.rows) {
    if (test === null) continue
    const outcome = test.outcome === 'fail' ? 'fails' : test.outcome === 'suspect' ? 'suspect' : test.near ? 'near' : 'passes'
    tests.set(test.id, { id: test.id, moisture: test.moisture, density: density(test.dryDensity), outcome, verification: test.purpose === 'verification' })
  }
  return [...tests.values()]
}

/** Everything the small plot of a cell draws; null where no curve is in force. */
export function cellPlot(column: Column, curve: Curve | undefined, criteria: readonly Criterion[], system: UnitSystem, waterDensity: number): Omit<AcceptanceWindowProps, 'label'> | null {
  if (curve === undefined || curve.pair === null || curve.fit.drawn.length === 0) return null
  const density = (kgM3: number): number => convertDensity(kgM3, 'kg/m3', system === 'us' ? 'pcf' : 'kN/m3')
  const drawn = curve.fit.drawn.map(([moisture, dry]): PlotPoint => ({ moisture, density: density(dry) }))
  const range = acceptedRange(criteria, curve.pair)
  const tests = plotted(column, density)
  const moistures = [...drawn, ...tests].map((point) => point.moisture)
  const from = Math.max(0, Math.min(...moistures) - 4)
  const to = Math.max(...moistures) + 4
  const zav = Array.from({ length: ZAV_STEPS + 1 }, (_, step): PlotPoint => {
    const moisture = from + (step / ZAV_STEPS) * (to - from)
    return { moisture, density: density(zeroAirVoidsDensity(moisture, curve.gs, waterDensity)) }
  })
  return {
    densityUnit: system === 'us' ? 'pcf' : 'kN/m³',
    curve: drawn,
    zav: { points: zav, label: `zero air voids, Gs ${curve.gs}` },
    accepted: range === undefined ? undefined : { ...range, densityMin: density(range.densityMin) },
    limit: range === undefined ? undefined : { density: density(range.densityMin), label: '' },
    tests,
    variant: 'small',
  }
}
