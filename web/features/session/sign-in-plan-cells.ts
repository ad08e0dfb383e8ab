import type { GroundState } from '#shared/domain/ground-state.ts'
import type { TestOutcome } from '#web/components/ui/test-mark.tsx'

export const CELL = 38
export const COLUMNS = 24
export const ROWS = 20

type PlanCell = { readonly column: number; readonly row: number; readonly state: GroundState; readonly lift: number }
type Patch = { readonly from: readonly [number, number]; readonly to: readonly [number, number]; readonly state: GroundState; readonly lift: number }

/** Painted one over the other, first to last. */
const PATCHES: readonly Patch[] = [
  { from: [1, 1], to: [22, 18], state: 'released', lift: 4 },
  { from: [1, 1], to: [6, 5], state: 'meets-spec', lift: 5 },
  { from: [4, 6], to: [12, 12], state: 'released', lift: 7 },
  { from: [9, 6], to: [12, 9], state: 'awaiting-test', lift: 8 },
  { from: [4, 11], to: [6, 12], state: 'rework', lift: 7 },
  { from: [13, 1], to: [17, 4], state: 'meets-spec', lift: 5 },
  { from: [18, 1], to: [22, 3], state: 'awaiting-test', lift: 5 },
  { from: [12, 8], to: [12, 9], state: 'suspect', lift: 8 },
  { from: [15, 8], to: [22, 18], state: 'not-placed', lift: 0 },
  { from: [15, 8], to: [17, 11], state: 'released', lift: 3 },
  { from: [13, 12], to: [14, 16], state: 'awaiting-retest', lift: 4 },
  { from: [1, 13], to: [3, 18], state: 'recheck', lift: 3 },
  { from: [7, 14], to: [9, 18], state: 'meets-spec', lift: 5 },
]

export const TESTS: readonly { column: number; row: number; outcome: TestOutcome; verification: boolean }[] = [
  { column: 3.4, row: 2.6, outcome: 'passes', verification: false },
  { column: 5.7, row: 4.4, outcome: 'near', verification: false },
  { column: 8.3, row: 3.2, outcome: 'passes', verification: false },
  { column: 10.8, row: 4.6, outcome: 'passes', verification: true },
  { column: 6.6, row: 8.3, outcome: 'passes', verification: false },
  { column: 7.9, row: 10.7, outcome: 'passes', verification: false },
  { column: 5.5, row: 12.1, outcome: 'fails', verification: false },
  { column: 12.5, row: 9, outcome: 'suspect', verification: false },
  { column: 15.6, row: 2.7, outcome: 'passes', verification: false },
  { column: 16.6, row: 9.8, outcome: 'passes', verification: false },
  { column: 19.4, row: 6.4, outcome: 'passes', verification: false },
  { column: 8.6, row: 16.4, outcome: 'passes', verification: false },
  { column: 11.4, row: 15.3, outcome: 'passes', verification: true },
]

function isInside(column: number, row: number): boolean {
  if (column < 1 || row < 1 || column > 22 || row > 18) return false
  if (column > 19 && row < 3) return false
  if (column < 3 && row < 3) return false
  if (column > 20 && row > 14) return false
  return !(column < 5 && row > 15)
}

function cellAt(column: number, row: number): PlanCell | null {
  if (!isInside(column, row)) return null
  const patch = PATCHES.findLast(({ from, to }) => column >= from[0] && column <= to[0] && row >= from[1] && row <= to[1])
  return patch === undefined ? null : { column, row, state: patch.state, lift: patch.lift }
}

export function cellStates(): readonly PlanCell[] {
  return Array.from({ length: COLUMNS * ROWS }, (_, index) => cellAt(index % COLUMNS, Math.floor(index / COLUMNS))).filter((cell) => cell !== null)
}

type Side = { readonly x: number; readonly y: number; readonly down: boolean; readonly toFar: number | null }

/** The right and lower sides of every place of the grid, with the drop from the near to the far cell; null at the boundary. */
function sides(): readonly Side[] {
  const found: Side[] = []
  for (let row = 0; row < ROWS; row += 1) {
    for (let column = 0; column < COLUMNS; column += 1) {
      const here = cellAt(column, row)
      for (const [far, down] of [[cellAt(column + 1, row), true], [cellAt(column, row + 1), false]] as const) {
        if (here === null && far === null) continue
        const drop = here === null || far === null ? null : here.lift - far.lift
        if (drop === 0) continue
        found.push({ x: (down ? column + 1 : column) * CELL, y: (down ? row : row + 1) * CELL, down, toFar: drop })
      }
    }
  }
  return found
}

const sidePath = ({ x, y, down }: Side): string => `M${x} ${y}${down ? 'v' : 'h'}${CELL}`

export function boundaryPath(): string {
  return sides().filter(({ toFar }) => toFar === null).map(sidePath).join('')
}

export function stepPath(): string {
  return sides().filter(({ toFar }) => toFar !== null).map(sidePath).join('')
}

/** Short strokes falling to the low side of every step. */
export function hachurePath(): string {
  return sides()
    .flatMap(({ x, y, down, toFar }) => {
      if (toFar === null) return []
      const low = toFar > 0 ? 1 : -1
      return [1, 2, 3, 4, 5, 6].map((index) => {
        const along = (index * CELL) / 7
        const length = low * (index % 2 === 1 ? 5 : 2.6)
        return down ? `M${x} ${y + along}h${length}` : `M${x + along} ${y}v${length}`
      })
    })
    .join('')
}

/** A contour of the ground before work began. */
export function contourPath(index: number, width: number): string {
  const y = index * 56 - 30
  const sway = Math.sin(index * 1.1) * 34
  return `M0 ${y + 50}C${width * 0.22} ${y - 36 + sway} ${width * 0.38} ${y + 78} ${width * 0.56} ${y + 8 - sway * 0.7}S${width * 0.86} ${y - 58} ${width} ${y - 16}`
}
