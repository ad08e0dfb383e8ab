import type { SitePlan } from '#api/features/ground/site-plan.ts'

/** A part of a zone that one crew fills in half a day. */
export interface Panel {
  readonly zone: 0 | 1 | 2
  readonly cells: readonly number[]
}

type Rectangle = readonly [fromColumn: number, toColumn: number, fromRow: number, toRow: number]

const PAD: readonly Rectangle[] = [
  [6, 10, 8, 12],
  [11, 16, 8, 12],
  [6, 10, 3, 7],
  [11, 16, 3, 7],
]
const COURT: readonly Rectangle[] = [
  [0, 5, 0, 4],
  [0, 5, 5, 8],
  [0, 5, 9, 12],
  [6, 13, 0, 2],
  [14, 21, 0, 2],
  [17, 23, 3, 6],
  [17, 20, 7, 12],
]
const BASIN: readonly Rectangle[] = [
  [2, 6, 13, 18],
  [7, 11, 13, 18],
  [12, 15, 13, 18],
]

function panelsOf(plan: SitePlan, zone: 0 | 1 | 2, rectangles: readonly Rectangle[]): Panel[] {
  return rectangles.map(([left, right, top, bottom]) => ({
    zone,
    cells: plan.cells
      .filter((cell) => cell.zone === zone && cell.column >= left && cell.column <= right && cell.row >= top && cell.row <= bottom)
      .map((cell) => cell.cell),
  }))
}

/** One half day's work: a lift over a panel. */
export interface Shift {
  readonly panel: Panel
  readonly lift: number
}

/** The shifts of a crew in the order they are worked: lift by lift over its panels, those with no fill at a lift left out. */
function shifts(plan: SitePlan, panels: readonly Panel[], lifts: readonly number[]): Shift[] {
  return lifts.flatMap((lift) =>
    panels.flatMap((panel): Shift[] => {
      const cells = panel.cells.filter((cell) => plan.layersOf(cell).some((layer) => layer.lift === lift))
      return cells.length > 0 ? [{ panel: { ...panel, cells }, lift }] : []
    }),
  )
}

const range = (from: number, to: number): number[] => Array.from({ length: to - from + 1 }, (_, index) => from + index)

/** What each of the two crews did, and what each is doing today. */
export function demoShifts(plan: SitePlan): { pad: Shift[]; court: Shift[]; padToday: Shift; courtToday: Shift; basinToday: Shift; panels: Panel[] } {
  const pad = panelsOf(plan, 0, PAD)
  const court = panelsOf(plan, 1, COURT)
  const basin = panelsOf(plan, 2, BASIN)
  const padShifts = shifts(plan, pad, range(1, 9))
  const padToday = shifts(plan, pad.slice(3), [10])
  const early = shifts(plan, [...basin, ...court], range(1, 2))
  const later = shifts(plan, [...court, ...basin.slice(0, 2)], [3]).concat(shifts(plan, court, range(4, 5)), shifts(plan, court.slice(1, 5), [6]))
  const courtToday = shifts(plan, court.slice(1, 2), [7])
  const basinToday = shifts(plan, basin.slice(2), [3])
  const [a] = padToday
  const [b] = courtToday
  const [c] = basinToday
  if (!a || !b || !c) throw new Error('The demo has nothing to place today')
  return { pad: padShifts, court: [...early, ...later], padToday: a, courtToday: b, basinToday: c, panels: [...pad, ...court, ...basin] }
}
