import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import type { DerivedLot } from '#api/features/ground/change-ground.ts'
import { loadLotNumbers, loadTestNumbers } from '#api/features/ground/running-numbers.queries.ts'
import { layerOf } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { deriveColumn } from '#shared/domain/column.ts'
import type { ColumnDerivation } from '#shared/domain/column-types.ts'
import { groundStateCode, groundStateOf } from '#shared/domain/ground-state.ts'
import type { PatchEntry } from '#shared/ground-codec.ts'

/** One (cell, lift) as it is stored. */
export type LayerRow = Omit<CellLiftEntity, 'siteId'>

export interface ColumnChange {
  readonly cell: number
  readonly column: ColumnDerivation
}

export interface RowChange {
  /** rows to store, new or changed */
  readonly changed: readonly LayerRow[]
  /** rows whose fill was voided */
  readonly gone: readonly LayerRow[]
  /** what stood before, by "cell lift" */
  readonly before: ReadonlyMap<string, LayerRow>
  readonly columns: readonly ColumnChange[]
  readonly entries: readonly PatchEntry[]
}

export function rowsOfLot(plan: SitePlan, { lot, derived }: DerivedLot): LayerRow[] {
  return derived.cells.flatMap((cell): LayerRow[] => {
    const layer = layerOf(plan, cell.cell, lot.lift)
    if (!layer) return []
    return [
      {
        cell: cell.cell,
        lift: lot.lift,
        zoneId: lot.zoneId,
        state: groundStateCode(cell.state),
        flags: cell.flags,
        lotId: lot.id,
        bottomUm: layer.bottomUm,
        topUm: layer.topUm,
        volumeCm3: cell.volumeCm3,
        spokenCm3: cell.spokenCm3,
        namingTestId: cell.namingTestId,
      },
    ]
  })
}

const keyOf = (row: { readonly cell: number; readonly lift: number }): string => `${row.cell} ${row.lift}`

/**
 * Sets freshly derived rows into their columns: which rows change (overlays of the lifts above and below included),
 * which went because their fill was voided, and what each touched cell's working surface is now.
 */
export async function deriveRows(
  manager: EntityManager,
  plan: SitePlan,
  fresh: readonly LayerRow[],
  lotIds: readonly string[],
): Promise<RowChange> {
  const siteId = plan.site.id
  const ofLots = lotIds.length > 0 ? await manager.findBy(CellLiftEntity, { siteId, lotId: In([...lotIds]) }) : []
  const cells = [...new Set([...fresh.map((row) => row.cell), ...ofLots.map((row) => row.cell)])].sort((a, b) => a - b)
  const stored = cells.length > 0 ? await manager.findBy(CellLiftEntity, { siteId, cell: In(cells) }) : []
  const before = new Map<string, LayerRow>(stored.map((row) => [keyOf(row), row]))
  const after = new Map(before)
  const freshKeys = new Set(fresh.map(keyOf))
  const gone = ofLots.filter((row) => !freshKeys.has(keyOf(row)))
  for (const row of gone) after.delete(keyOf(row))
  for (const row of fresh) after.set(keyOf(row), row)

  const byCell = new Map<number, LayerRow[]>(cells.map((cell) => [cell, []]))
  for (const row of after.values()) byCell.get(row.cell)?.push(row)
  const columns = cells.map((cell): ColumnChange => {
    const rows = (byCell.get(cell) ?? []).map((row) => ({ lift: row.lift, state: groundStateOf(row.state), flags: row.flags }))
    return { cell, column: deriveColumn({ layers: plan.layersOf(cell), rows }) }
  })
  for (const { cell, column } of columns) {
    for (const { lift, flags } of column.rows) {
      const row = after.get(`${cell} ${lift}`)
      if (row && row.flags !== flags) after.set(`${cell} ${lift}`, { ...row, flags })
    }
  }
  const changed = [...after.values()].filter((row) => differs(before.get(keyOf(row)), row))
  const entries = await patchEntries(manager, plan, { changed, gone, after, columns })
  return { changed, gone, before, columns, entries }
}

function differs(before: LayerRow | undefined, after: LayerRow): boolean {
  if (!before) return true
  return (
    before.state !== after.state ||
    before.flags !== after.flags ||
    before.lotId !== after.lotId ||
    before.volumeCm3 !== after.volumeCm3 ||
    before.spokenCm3 !== after.spokenCm3 ||
    before.namingTestId !== after.namingTestId ||
    before.bottomUm !== after.bottomUm ||
    before.topUm !== after.topUm
  )
}

interface Settled {
  readonly changed: readonly LayerRow[]
  readonly gone: readonly LayerRow[]
  readonly after: ReadonlyMap<string, LayerRow>
  readonly columns: readonly ColumnChange[]
}

async function patchEntries(manager: EntityManager, plan: SitePlan, { changed, gone, after, columns }: Settled): Promise<PatchEntry[]> {
  const surfaceOf = new Map(columns.map(({ cell, column }) => [cell, after.get(`${cell} ${column.surfaceLift}`)]))
  const named = [...changed, ...surfaceOf.values()].filter((row) => row !== undefined)
  const lots = await loadLotNumbers(manager, plan.site.id, named.map((row) => row.lotId))
  const tests = await loadTestNumbers(manager, plan.site.id, named.map((row) => row.namingTestId))
  const standing = (row: LayerRow) => ({
    lift: row.lift,
    state: row.state,
    flags: row.flags,
    top: toTenths(row.topUm),
    lot: lots.get(row.lotId ?? '') ?? 0,
    test: tests.get(row.namingTestId ?? '') ?? 0,
  })
  const entryOf = (row: LayerRow): PatchEntry[] => {
    const surface = surfaceOf.get(row.cell)
    return surface ? [{ cell: row.cell, ...standing(row), surface: standing(surface) }] : []
  }
  const emptied = gone.map((row) => ({ ...row, state: groundStateCode('not-placed'), flags: 0, lotId: null, namingTestId: null }))
  return [...changed, ...emptied].flatMap(entryOf)
}

/** Micrometres as the codec carries elevations. */
export function toTenths(um: number): number {
  return Math.round(um / 100)
}
