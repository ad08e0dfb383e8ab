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
  /** one per placed cell; cells that keep their lot first */
  readonly assignments: readonly LotAssignment[]
  /** how many new lots to open */
  readonly newLots: number
  /** lots a placement bridges: every cell of `from` goes `into` the oldest */
  readonly merges: readonly { readonly from: string; readonly into: string }[]
}

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

  const mergedInto = new Map<ExistingLot, ExistingLot>()
  const settle = (lot: ExistingLot): ExistingLot => {
    const into = mergedInto.get(lot)
    return into === undefined ? lot : settle(into)
  }
  const homeOf = new Map<number, ExistingLot | number>()
  for (const { cell } of placed) {
    const lot = lotOfCell.get(cell)
    if (lot !== undefined) homeOf.set(cell, lot)
  }
  let newLots = 0
  for (const piece of piecesOf(fresh)) {
    const touched = piece.flatMap((cell) => placesAround(cell).flatMap((place) => lotAt.get(place) ?? []))
    const [oldest, ...others] = [...new Set(touched.map(settle))].sort((a, b) => a.seq - b.seq)
    for (const lot of others) mergedInto.set(lot, oldest)
    const home = oldest ?? newLots++
    for (const { cell } of piece) homeOf.set(cell, home)
  }
  return {
    assignments: [...homeOf].map(([cell, home]) =>
      typeof home === 'number' ? { cell, newLotIndex: home } : { cell, lotId: settle(home).lotId },
    ),
    newLots,
    merges: [...mergedInto.keys()].map((lot) => ({ from: lot.lotId, into: settle(lot).lotId })),
  }
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
