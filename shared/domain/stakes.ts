import { squaredDistance } from './failure-marks.ts'
import { distanceToEdge, lotEdge, type OutlinedCell, type Segment } from './lot-edge.ts'
import { measureRing, ringHolds } from './plan-ring.ts'
import { randomLocation, seededRandom } from './seeded-random.ts'
import type { GridPoint } from './site-geometry.ts'

/** Points tried at one set-back before a smaller one is taken. */
const TRIES_PER_SETBACK = 64

export interface StakeCell extends OutlinedCell {
  /** fill of the cell no pass speaks for yet, whole cm³; 0 where passes hold all of it */
  readonly unspokenCm3: number
}

export interface StakeInput {
  /** tests to be staked in all (toStake of the lot) */
  readonly owed: number
  /** stakes that stand: they never move, and count */
  readonly standing: readonly { readonly cell: number }[]
  /** the whole placed lot */
  readonly cells: readonly StakeCell[]
  /** side of a whole cell, mm */
  readonly sideMm: number
  /** distance to keep from the lot's edge, mm, 0 or more */
  readonly setbackMm: number
  /** 32 hexadecimal digits, drawn fresh at the moment of the draw and stored */
  readonly seed: string
}

/** How a point was drawn: with the seed, enough to repeat it. */
export interface StakeStep {
  /** 0-based group among the groups of equal volume */
  readonly group: number
  readonly groupCells: readonly number[]
  /** the three numbers that gave cell, u and v; empty where the cell's centroid was taken */
  readonly numbers: readonly number[]
  /** points tried, the one taken included */
  readonly tries: number
  /** the set-back kept, mm */
  readonly setbackMm: number
}

export interface DrawnStake extends GridPoint {
  readonly cell: number
  readonly step: StakeStep
}

/**
 * Stakes for the tests owed and not yet staked: the unspoken, unstaked cells in serpentine order, split into as many
 * groups of equal volume, one point in each, uniform over the cells' clipped areas (stratified random location after
 * ASTM D3665). A point nearer to the lot's edge than the set-back is drawn again; where the cells are too
 * small for it the set-back falls to a half, a quarter, none. Where every unspoken cell is staked these are taken
 * again, and where none is unspoken the whole lot is.
 * @returns whole mm in grid axes, one per group; none where nothing is owed or placed
 */
export function drawStakes({ owed, standing, cells, sideMm, setbackMm, seed }: StakeInput): DrawnStake[] {
  const count = Math.max(0, owed - standing.length)
  if (count === 0 || cells.length === 0) return []
  const random = seededRandom(seed)
  const edge = lotEdge(cells, sideMm)
  return splitEqually(serpentine(candidates(cells, standing)), count).map((group, index) =>
    drawIn(group, edge, setbackMm, random, index),
  )
}

/**
 * Cells in serpentine order: rows from the top, the first left to right, the next right to left (by row number, so the
 * order of a cell does not hang on which rows are present).
 */
export function serpentine<Cell extends { readonly column: number; readonly row: number }>(cells: readonly Cell[]): Cell[] {
  return [...cells].sort((a, b) => a.row - b.row || (a.row % 2 === 0 ? a.column - b.column : b.column - a.column))
}

/**
 * Splits cells, kept in their order, into groups of equal unspoken volume: a cell goes to the group its middle lies
 * in, so that no group differs from its equal part by more than one cell's volume. A group no middle falls in is the
 * cell that holds its own middle.
 * @param count whole number above 0
 */
export function splitEqually<Cell extends { readonly unspokenCm3: number }>(cells: readonly Cell[], count: number): Cell[][] {
  // cells that are all spoken for weigh the same
  const weights = cells.map((cell) => cell.unspokenCm3)
  const even = weights.every((weight) => weight === 0)
  const weightOf = (index: number) => (even ? 1 : weights[index])
  const total = cells.reduce((sum, _, index) => sum + weightOf(index), 0)
  const groups: Cell[][] = Array.from({ length: count }, () => [])
  const ends: number[] = []
  let before = 0
  cells.forEach((cell, index) => {
    const twiceMiddle = 2 * before + weightOf(index)
    groups[Math.min(count - 1, Math.floor((twiceMiddle * count) / (2 * total)))].push(cell)
    before += weightOf(index)
    ends.push(before)
  })
  return groups.map((group, index) => {
    if (group.length > 0) return group
    const holder = ends.findIndex((end) => end * 2 * count > (2 * index + 1) * total)
    return [cells[holder]]
  })
}

/** Stakes a required test retires: those within 3 m of it unless set otherwise. */
export function stakesRetiredBy<Stake extends GridPoint>(stakes: readonly Stake[], test: GridPoint, withinMm = 3000): Stake[] {
  return stakes.filter((stake) => squaredDistance(stake, test) <= withinMm ** 2)
}

function candidates(cells: readonly StakeCell[], standing: StakeInput['standing']): readonly StakeCell[] {
  const staked = new Set(standing.map((stake) => stake.cell))
  const unspoken = cells.filter((cell) => cell.unspokenCm3 > 0)
  const free = unspoken.filter((cell) => !staked.has(cell.cell))
  return free.length > 0 ? free : unspoken.length > 0 ? unspoken : cells
}

function drawIn(group: readonly StakeCell[], edge: readonly Segment[], setbackMm: number, random: () => number, index: number): DrawnStake {
  const groupCells = group.map((cell) => cell.cell)
  // a cell is picked by its bounding rectangle and the point thrown away outside its ring: uniform over the cut areas
  const frames = group.map((cell) => frameOf(cell.outline))
  const frameAreas = frames.map((frame) => frame.width * frame.height)
  let tries = 0
  for (const setback of setbackMm > 0 ? [setbackMm, setbackMm / 2, setbackMm / 4, 0] : [0]) {
    for (let attempt = 0; attempt < TRIES_PER_SETBACK; attempt++) {
      const numbers = [random(), random(), random()]
      tries++
      const picked = pickByArea(frameAreas, numbers[0])
      const cell = group[picked]
      const point = pointIn(frames[picked], numbers[1], numbers[2])
      if (!ringHolds(cell.outline, point) || distanceToEdge(point, edge) < setback) continue
      return { cell: cell.cell, ...point, step: { group: index, groupCells, numbers, tries, setbackMm: setback } }
    }
  }
  // slivers that no point hit: the middle of the largest
  const areas = group.map((cell) => measureRing(cell.outline)?.areaMm2 ?? 0)
  const largest = group[areas.indexOf(Math.max(...areas))]
  const { u, v } = measureRing(largest.outline)?.centroid ?? largest.outline[0]
  return { cell: largest.cell, u: Math.round(u), v: Math.round(v), step: { group: index, groupCells, numbers: [], tries, setbackMm: 0 } }
}

interface Frame {
  readonly left: number
  readonly top: number
  readonly width: number
  readonly height: number
}

function frameOf(outline: readonly GridPoint[]): Frame {
  const us = outline.map((point) => point.u)
  const vs = outline.map((point) => point.v)
  const [left, top] = [Math.min(...us), Math.min(...vs)]
  return { left, top, width: Math.max(...us) - left, height: Math.max(...vs) - top }
}

function pickByArea(areas: readonly number[], number: number): number {
  let left = number * areas.reduce((sum, area) => sum + area, 0)
  const at = areas.findIndex((area) => (left -= area) < 0)
  return at < 0 ? areas.length - 1 : at
}

/** A point of the frame, whole mm. */
function pointIn(frame: Frame, right: number, down: number): GridPoint {
  return {
    u: Math.round(randomLocation(frame.left, frame.width, right)),
    v: Math.round(randomLocation(frame.top, frame.height, down)),
  }
}
