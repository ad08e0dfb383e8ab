import type { GridPoint } from './site-geometry.ts'
import { sortStable } from './sort-stable.ts'

/** A slice of fill that takes part. `slice` is the placement's id, unique within a cell. */
export interface AllocationSlice {
  readonly cell: number
  readonly slice: string
  readonly placedAt: number
  /** whole cm³, 0 or more */
  readonly volumeCm3: number
}

/** A required-purpose test point that holds a share. */
export interface AllocationPoint {
  readonly testId: string
  readonly at: GridPoint
  readonly sampledAt: number
  readonly outcome: 'pass' | 'fail' | 'suspect' | 'pending'
  /** a retest: cells of the order it answers; it speaks for their earlier slices before any other */
  readonly firstCells?: readonly number[]
}

/** Released ground: its volume and the shares it stands on leave the pool first. */
export interface FrozenCell {
  readonly cell: number
  /** the cell's volume when it was released, taken from its oldest slices */
  readonly volumeCm3: number
  readonly pairs: readonly { readonly testId: string; readonly cell: number; readonly cm3: number }[]
}

export interface AllocationInput {
  readonly slices: readonly AllocationSlice[]
  readonly points: readonly AllocationPoint[]
  readonly frozen: readonly FrozenCell[]
  /** volume one test may speak for, whole cm³ */
  readonly fCm3: number
  /** cell's centroid and the thickness of its layer (µm); every cell of a slice is known */
  readonly cellOf: (cell: number) => { readonly centroid: GridPoint; readonly thicknessUm: number }
}

export interface AllocatedShare {
  readonly testId: string
  readonly cell: number
  readonly slice: string
  readonly cm3: number
  /** the cell lies farther than 2√(f / π·thickness) from the test */
  readonly far: boolean
}

/** What each outcome holds of a cell, whole cm³, frozen shares (of passes) included. */
export interface HeldVolume {
  readonly pass: number
  readonly fail: number
  readonly suspect: number
  readonly pending: number
}

export interface Allocation {
  /** in the order in which they were given */
  readonly shares: readonly AllocatedShare[]
  /** by cell; a cell nothing speaks for has no entry */
  readonly held: ReadonlyMap<number, HeldVolume>
}

/**
 * Which test speaks for which fill (domain section 6, "Speaking for"). Frozen shares leave the pool; then all
 * (slice, test) pairs are taken in one order: first the slices placed before the test was sampled (a retest's own
 * order first), then later slices by time of placing; within that by squared distance from the slice's cell centroid
 * to the test, then cell index, slice id, test id; each pair moves min(left in slice, left in test).
 * One order for both sides makes it the stable allocation (Baïou and Balinski 2002): the records' order of arrival
 * changes nothing, and a further test never leaves a slice with less.
 * @returns shares and the volumes held per cell, whole cm³
 */
export function allocateShares(input: AllocationInput): Allocation {
  const slices = [...input.slices].sort((a, b) => a.cell - b.cell || compareText(a.slice, b.slice))
  const points = [...input.points].sort((a, b) => compareText(a.testId, b.testId))
  const sliceLeft = leaveReleased(slices, input.frozen)
  const testLeft = leaveFrozen(points, input.frozen, input.fCm3)
  const held = new Map<number, Record<AllocationPoint['outcome'], number>>()
  const hold = (cell: number, outcome: AllocationPoint['outcome'], cm3: number) => {
    const entry = held.get(cell) ?? { pass: 0, fail: 0, suspect: 0, pending: 0 }
    entry[outcome] += cm3
    held.set(cell, entry)
  }
  for (const pair of input.frozen.flatMap((cell) => cell.pairs)) hold(pair.cell, 'pass', pair.cm3)

  const shares: AllocatedShare[] = []
  const distances = measurePairs(slices, points, input)
  let toGive = Math.min(sum(sliceLeft), sum(testLeft))
  const order = orderPairs(slices, points, distances)
  for (let turn = 0; toGive > 0; turn++) {
    const pair = order[turn]
    const s = Math.floor(pair / points.length)
    const t = pair % points.length
    const cm3 = Math.min(sliceLeft[s], testLeft[t])
    if (cm3 === 0) continue
    sliceLeft[s] -= cm3
    testLeft[t] -= cm3
    toGive -= cm3
    const slice = slices[s]
    const point = points[t]
    const far = isFar(distances[pair], input.fCm3, input.cellOf(slice.cell).thicknessUm)
    shares.push({ testId: point.testId, cell: slice.cell, slice: slice.slice, cm3, far })
    hold(slice.cell, point.outcome, cm3)
  }
  return { shares, held }
}

/**
 * True when a cell lies farther from a test than one test reasonably reaches: twice the radius of the disc of
 * volume f in a layer of this thickness, 2√(f / π·thickness).
 * @param squaredMm squared distance from test to cell centroid, mm²
 * @param fCm3 volume one test may speak for, cm³
 * @param thicknessUm thickness of the layer, µm; nothing is far in a layer of 0
 */
export function isFar(squaredMm: number, fCm3: number, thicknessUm: number): boolean {
  // f in mm³ is f·1e3, the thickness in mm is µm / 1e3
  return thicknessUm > 0 && squaredMm > (4 * fCm3 * 1e6) / (Math.PI * thicknessUm)
}

/** Volumes left in the slices once released ground is gone, oldest slices first. */
function leaveReleased(slices: readonly AllocationSlice[], frozen: readonly FrozenCell[]): number[] {
  const left = slices.map((slice) => slice.volumeCm3)
  const byAge = slices.map((_, index) => index).sort((a, b) => slices[a].placedAt - slices[b].placedAt || a - b)
  const released = new Map(frozen.map((cell) => [cell.cell, cell.volumeCm3]))
  for (const index of byAge) {
    const cell = slices[index].cell
    const toTake = released.get(cell) ?? 0
    const taken = Math.min(left[index], toTake)
    left[index] -= taken
    released.set(cell, toTake - taken)
  }
  return left
}

/** Volume each test may still give; 0 where f has since fallen below what it gave to released ground. */
function leaveFrozen(points: readonly AllocationPoint[], frozen: readonly FrozenCell[], fCm3: number): number[] {
  const given = new Map<string, number>()
  for (const pair of frozen.flatMap((cell) => cell.pairs)) given.set(pair.testId, (given.get(pair.testId) ?? 0) + pair.cm3)
  return points.map((point) => Math.max(0, fCm3 - (given.get(point.testId) ?? 0)))
}

/** Squared distances, mm², at slice × number of tests + test. */
function measurePairs(slices: readonly AllocationSlice[], points: readonly AllocationPoint[], input: AllocationInput): Float64Array {
  const distances = new Float64Array(slices.length * points.length)
  let pair = 0
  for (const slice of slices) {
    const { u, v } = input.cellOf(slice.cell).centroid
    for (const { at } of points) distances[pair++] = (at.u - u) ** 2 + (at.v - v) ** 2
  }
  return distances
}

/** All pairs in the order of allocation. They are numbered by cell, slice id and test id, so a stable sort keeps those ties. */
function orderPairs(slices: readonly AllocationSlice[], points: readonly AllocationPoint[], distances: Float64Array): Uint32Array {
  const times = [...new Set(slices.map((slice) => slice.placedAt))].sort((a, b) => a - b)
  const timeRank = new Map(times.map((time, rank) => [time, rank]))
  const firstCells = points.map((point) => (point.firstCells === undefined ? null : new Set(point.firstCells)))
  const sampledAt = Float64Array.from(points, (point) => point.sampledAt)
  const order = new Uint32Array(distances.length)
  const turns = new Float64Array(distances.length)
  let pair = 0
  for (const { cell, placedAt } of slices) {
    const later = 2 + (timeRank.get(placedAt) ?? 0)
    for (let t = 0; t < points.length; t++) {
      turns[pair] = placedAt > sampledAt[t] ? later : firstCells[t]?.has(cell) === true ? 0 : 1
      order[pair] = pair
      pair++
    }
  }
  return sortStable(sortStable(order, distances), turns)
}

function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0)
}
