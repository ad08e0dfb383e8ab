/** A point of a compaction plot: moisture percent of dry mass, dry density in the plot's unit. */
export type PlotPoint = { readonly moisture: number; readonly density: number }

/** Ground that meets the specification: a moisture range above a minimum density. Open sides are left out. */
export type AcceptedRange = {
  readonly moistureMin?: number | undefined
  readonly moistureMax?: number | undefined
  readonly densityMin: number
  readonly densityMax?: number | undefined
}

export type Extent = { readonly moisture: readonly [number, number]; readonly density: readonly [number, number] }

/** Density of a line at a moisture, straight between its points; the ends go on level. Null for an empty line. */
export function densityOn(line: readonly PlotPoint[], moisture: number): number | null {
  const first = line[0]
  const last = line.at(-1)
  if (first === undefined || last === undefined) return null
  if (moisture <= first.moisture) return first.density
  for (let index = 1; index < line.length; index += 1) {
    const left = line[index - 1]
    const right = line[index]
    if (left === undefined || right === undefined || moisture > right.moisture) continue
    const run = right.moisture - left.moisture
    return run === 0 ? right.density : left.density + ((moisture - left.moisture) / run) * (right.density - left.density)
  }
  return last.density
}

/** Outline of the accepted ground inside the plot: the moisture range from the minimum up to the zero-air-voids line. */
export function acceptedOutline(range: AcceptedRange, zav: readonly PlotPoint[], extent: Extent): readonly PlotPoint[] {
  const low = Math.max(range.moistureMin ?? extent.moisture[0], extent.moisture[0])
  const high = Math.min(range.moistureMax ?? extent.moisture[1], extent.moisture[1])
  if (low >= high) return []
  const ceiling = Math.min(range.densityMax ?? extent.density[1], extent.density[1])
  const steps = 40
  const top = Array.from({ length: steps + 1 }, (_, index): PlotPoint => {
    const moisture = high - (index / steps) * (high - low)
    const cap = densityOn(zav, moisture) ?? ceiling
    return { moisture, density: Math.max(range.densityMin, Math.min(cap, ceiling)) }
  })
  return [{ moisture: low, density: range.densityMin }, { moisture: high, density: range.densityMin }, ...top]
}

function padded(values: readonly number[], step: number, headroom: number, fallback: readonly [number, number]): readonly [number, number] {
  const finite = values.filter((value) => Number.isFinite(value))
  if (finite.length === 0) return fallback
  const low = Math.floor((Math.min(...finite) - step * 0.35) / step) * step
  const high = Math.ceil((Math.max(...finite) + step * headroom) / step) * step
  return [Math.max(0, low), high]
}

/** Room for the curve, the window and the tests, in whole steps of the axes. The zero-air-voids line only passes through. */
export function plotExtent(points: readonly PlotPoint[], range: AcceptedRange | undefined, steps: { moisture: number; density: number }): Extent {
  const moistures = points.map((point) => point.moisture)
  const densities = points.map((point) => point.density)
  if (range !== undefined) {
    moistures.push(range.moistureMin ?? NaN, range.moistureMax ?? NaN)
    densities.push(range.densityMin)
  }
  return {
    moisture: padded(moistures, steps.moisture, 0.35, [0, 20]),
    density: padded(densities, steps.density, 1, [steps.density * 20, steps.density * 25]),
  }
}

/** The point of the accepted range nearest to a test outside it, sideways where moisture is out, else upwards. Null inside. */
export function missedBy(test: PlotPoint, range: AcceptedRange): PlotPoint | null {
  const { moistureMin, moistureMax, densityMin } = range
  if (moistureMin !== undefined && test.moisture < moistureMin) return { moisture: moistureMin, density: test.density }
  if (moistureMax !== undefined && test.moisture > moistureMax) return { moisture: moistureMax, density: test.density }
  if (test.density < densityMin) return { moisture: test.moisture, density: densityMin }
  return null
}
