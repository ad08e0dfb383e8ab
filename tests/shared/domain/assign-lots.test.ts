import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { assignLots, type ExistingLot, type PlacedCell } from '#shared/domain/assign-lots.ts'

const COLUMNS = 12
const cellAt = (column: number, row: number): PlacedCell => ({ cell: row * COLUMNS + column, column, row })
const lot = (lotId: string, seq: number, cells: PlacedCell[], key = 'k'): ExistingLot => ({ lotId, seq, key, cells })

describe('lots of a placement', () => {
  it('opens one lot for cells that touch by side or corner, another for a piece more than one cell apart', () => {
    const result = assignLots([], [cellAt(0, 0), cellAt(1, 1), cellAt(3, 1)], 'k')
    expect(result.assignments).toEqual([
      { cell: 0, newLotIndex: 0 },
      { cell: 13, newLotIndex: 0 },
      { cell: 15, newLotIndex: 1 },
    ])
    expect(result).toMatchObject({ newLots: 2, merges: [] })
  })

  it('joins the lot of the same key it touches', () => {
    const result = assignLots([lot('A', 1, [cellAt(0, 0)])], [cellAt(1, 0), cellAt(2, 0)], 'k')
    expect(result).toEqual({ assignments: [{ cell: 1, lotId: 'A' }, { cell: 2, lotId: 'A' }], newLots: 0, merges: [] })
  })

  it('opens its own lot beside a lot of another day', () => {
    const result = assignLots([lot('A', 1, [cellAt(0, 0)], 'yesterday')], [cellAt(1, 0)], 'today')
    expect(result).toEqual({ assignments: [{ cell: 1, newLotIndex: 0 }], newLots: 1, merges: [] })
  })

  it('keeps a cell in its lot whatever the day: a top-up is a later slice', () => {
    const result = assignLots([lot('A', 1, [cellAt(0, 0)], 'yesterday')], [cellAt(0, 0), cellAt(1, 0)], 'today')
    expect(result.assignments).toEqual([{ cell: 0, lotId: 'A' }, { cell: 1, newLotIndex: 0 }])
  })

  it('merges the lots it bridges into the oldest', () => {
    const lots = [lot('B', 2, [cellAt(0, 0)]), lot('A', 1, [cellAt(2, 0)]), lot('C', 3, [cellAt(6, 6)])]
    const result = assignLots(lots, [cellAt(1, 0)], 'k')
    expect(result).toEqual({ assignments: [{ cell: 1, lotId: 'A' }], newLots: 0, merges: [{ from: 'B', into: 'A' }] })
  })

  it('follows a chain of merges to its end', () => {
    const lots = [lot('A', 3, [cellAt(0, 0)]), lot('B', 2, [cellAt(2, 0)]), lot('C', 1, [cellAt(4, 0)])]
    const result = assignLots(lots, [cellAt(1, 0), cellAt(3, 0)], 'k')
    expect(result.assignments).toEqual([{ cell: 1, lotId: 'C' }, { cell: 3, lotId: 'C' }])
    expect(result.merges).toEqual([{ from: 'A', into: 'C' }, { from: 'B', into: 'C' }])
  })

  it('parts a set of placements of one key into the same lots in whatever order they arrive', () => {
    const placement = fc.uniqueArray(fc.integer({ min: 0, max: COLUMNS * COLUMNS - 1 }), { minLength: 1, maxLength: 8 })
    const placements = fc.array(placement, { minLength: 1, maxLength: 8 })
    const partition = (sequence: readonly number[][]) => {
      let lots: ExistingLot[] = []
      let seq = 0
      for (const cells of sequence) {
        const placed = cells.map((cell) => cellAt(cell % COLUMNS, Math.floor(cell / COLUMNS)))
        const { assignments, newLots, merges } = assignLots(lots, placed, 'k')
        const opened = Array.from({ length: newLots }, () => lot(`L${++seq}`, seq, []))
        const into = new Map(merges.map((merge) => [merge.from, merge.into]))
        const home = new Map(lots.flatMap((own) => own.cells.map((cell) => [cell, into.get(own.lotId) ?? own.lotId] as const)))
        for (const assignment of assignments) {
          const cell = placed.find((one) => one.cell === assignment.cell)
          if (cell === undefined || [...home.keys()].some((known) => known.cell === cell.cell)) continue
          home.set(cell, 'lotId' in assignment ? assignment.lotId : opened[assignment.newLotIndex].lotId)
        }
        lots = [...lots, ...opened]
          .filter((own) => !into.has(own.lotId))
          .map((own) => ({ ...own, cells: [...home].filter(([, id]) => id === own.lotId).map(([cell]) => cell) }))
      }
      return lots.map((own) => own.cells.map((cell) => cell.cell).sort((a, b) => a - b).join(' ')).sort()
    }
    fc.assert(
      fc.property(placements, fc.array(fc.integer({ min: 0, max: 1000 }), { minLength: 8, maxLength: 8 }), (sequence, ranks) => {
        const shuffled = sequence.map((cells, i) => ({ cells, rank: ranks[i] })).sort((a, b) => a.rank - b.rank).map((item) => item.cells)
        expect(partition(shuffled)).toEqual(partition(sequence))
      }),
      { seed: 20261201, numRuns: 200 },
    )
  })
})
