/** A cell by its place in the grid. */
export interface PlacedCell {
  readonly cell: number
  readonly column: number
  readonly row: number
}

/** A lot that already holds cells of this zone and lift, whatever its key. */
export interface ExistingLot {
  readonly lotId: string
  readonly key: string
  /** running number: the lower is the older */
  readonly seq: number
  readonly cells: readonly PlacedCell[]
}

/** Where a placed cell goes: a lot that exists, or the n-th new one. */
export type LotAssignment =
  | { readonly cell: number; readonly lotId: string }
  | { readonly cell: number; readonly newLotIndex: number }

export interface LotAssignments {
  /** in the order of the placed cells */
  readonly assignments: readonly LotAssignment[]
  /** how many new lots to open */
  readonly newLots: number
  /** lots a placement bridges: every cell of `from` goes `into` the oldest */
  readonly merges: readonly { readonly from: string; readonly into: string }[]
}

/** A lot that exists, or one to open, as the joining of pieces sees it. */
type Home = ExistingLot | undefined

/**
 * The lots the cells of one placement belong to (domain section 5). A (cell, lift) already in a lot stays there
 * whatever the key: a top-up is a later slice. The other cells join the lot of the same key they touch, sides or
 * corners (pieces more than one cell apart are separate); where they touch several, these become the oldest of them;
 * pieces that touch none are new lots. So the partition of a set of placements of one key is their connected pieces,
 * in whatever order they arrive.
 * @param lots the lots of this zone and lift
 * @param placed the placement's cells, each once
 * @param key the placement's own key
 */
export function assignLots(lots: readonly ExistingLot[], placed: readonly PlacedCell[], key: string): LotAssignments {
  const lotOfCell = new Map(lots.flatMap((lot) => lot.cells.map((cell) => [cell.cell, lot] as const)))
  const fresh = placed.filter((cell) => !lotOfCell.has(cell.cell))
  const sameKey = lots.filter((lot) => lot.key === key)
  const lotAt = new Map(sameKey.flatMap((lot) => lot.cells.map((cell) => [placeOf(cell), lot] as const)))

  const homeOfCell = new Map<number, Home | number>()
  const merges: { from: string; into: string }[] = []
  const mergedInto = new Map<string, ExistingLot>()
  const settle = (lot: ExistingLot): ExistingLot => {
    const into = mergedInto.get(lot.lotId)
    return into === undefined ? lot : settle(into)
  }
  let newLots = 0
  for (const piece of piecesOf(fresh)) {
    const touched = [...new Set(piece.flatMap((cell) => placesAround(cell).flatMap((place) => lotAt.get(place) ?? [])).map(settle))]
    const [oldest, ...others] = touched.sort((a, b) => a.seq - b.seq)
    for (const lot of others) {
      mergedInto.set(lot.lotId, oldest)
      merges.push({ from: lot.lotId, into: oldest.lotId })
    }
    const home = oldest ?? newLots++
    for (const cell of piece) homeOfCell.set(cell.cell, home)
  }
  const finalLot = (lot: ExistingLot) => settle(lot).lotId
  const assignments = placed.map(({ cell }): LotAssignment => {
    const home = homeOfCell.get(cell) ?? lotOfCell.get(cell)
    if (typeof home === 'number') return { cell, newLotIndex: home }
    if (home === undefined) throw new RangeError(`Cell ${cell} found no lot`)
    return { cell, lotId: finalLot(home) }
  })
  return { assignments, newLots, merges: merges.map(({ from, into }) => ({ from, into: settleId(into, mergedInto) })) }
}

/** Connected pieces, sides or corners touching, each in the order the cells are given. */
export function piecesOf<Cell extends PlacedCell>(cells: readonly Cell[]): Cell[][] {
  const waiting = new Map(cells.map((cell) => [placeOf(cell), cell]))
  const pieces: Cell[][] = []
  for (const first of cells) {
    if (!waiting.delete(placeOf(first))) continue
    const piece = [first]
    // the list grows while it is walked: each cell brings the neighbours still waiting
    for (const cell of piece) {
      for (const place of placesAround(cell)) {
        const neighbour = waiting.get(place)
        if (neighbour === undefined) continue
        waiting.delete(place)
        piece.push(neighbour)
      }
    }
    pieces.push(piece)
  }
  return pieces
}

function placeOf({ column, row }: { readonly column: number; readonly row: number }): string {
  return `${column},${row}`
}

function placesAround({ column, row }: PlacedCell): string[] {
  const steps = [-1, 0, 1]
  return steps.flatMap((down) => steps.map((right) => placeOf({ column: column + right, row: row + down })))
}

function settleId(lotId: string, mergedInto: ReadonlyMap<string, ExistingLot>): string {
  const into = mergedInto.get(lotId)
  return into === undefined ? lotId : settleId(into.lotId, mergedInto)
}
