import type { EntityManager } from 'typeorm'
import type { LayerRow } from '#api/features/ground/layer-rows.ts'
import { loadAcceptedAsIs, loadReleases } from '#api/features/ground/lot-facts.queries.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { deriveLot } from '#shared/domain/derive-lot.ts'
import { groundStateCode } from '#shared/domain/ground-state.ts'
import type { FoundationInspection, LotFacts } from '#shared/domain/lot-facts.ts'

/** State of foundation cells (lift 0) from their inspections, releases and dispositions. */
export async function deriveFoundation(manager: EntityManager, plan: SitePlan, cells: readonly number[]): Promise<LayerRow[]> {
  const inZones = cells.filter((cell) => plan.zoneOf(cell) !== undefined)
  if (inZones.length === 0) return []
  const facts = await loadFoundation(manager, plan, inZones)
  return deriveLot(facts).cells.flatMap((derived): LayerRow[] => {
    const geometry = plan.cells[derived.cell]
    const zone = plan.zoneOf(derived.cell)
    if (!geometry || !zone) return []
    return [
      {
        cell: derived.cell,
        lift: 0,
        zoneId: zone.id,
        state: groundStateCode(derived.state),
        flags: derived.flags,
        lotId: null,
        bottomUm: geometry.baseUm,
        topUm: geometry.baseUm,
        volumeCm3: 0,
        spokenCm3: 0,
        namingTestId: null,
      },
    ]
  })
}

async function loadFoundation(manager: EntityManager, plan: SitePlan, cells: readonly number[]): Promise<LotFacts> {
  const siteId = plan.site.id
  const inspections: FoundationInspection[] = await manager.query(
    'SELECT c.`cell`, i.`outcome` FROM `inspection_cell` c JOIN `inspection` i ON i.`site_id` = c.`site_id` AND i.`id` = c.`inspection_id` WHERE c.`site_id` = ? AND c.`cell` IN (?) ORDER BY i.`happened_at`, i.`recorded_at`, i.`id`',
    [siteId, cells],
  )
  const latest = new Map(inspections.map((inspection) => [inspection.cell, inspection]))
  return {
    lift: 0,
    rules: [],
    cells: cells.flatMap((cell) => {
      const geometry = plan.cells[cell]
      if (!geometry) return []
      const { column, row, centroid, areaMm2 } = geometry
      return [{ cell, column, row, centroid, areaMm2, thicknessUm: 0, partial: false }]
    }),
    slices: [],
    tests: [],
    marks: [],
    orders: [],
    releases: await loadReleases(manager, siteId, 0, cells),
    acceptedAsIs: await loadAcceptedAsIs(manager, siteId, 0, cells),
    inspections: [...latest.values()],
  }
}
