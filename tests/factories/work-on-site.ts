import { randomUUID } from 'node:crypto'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { addOrderStep } from '#api/features/ground/order-steps.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { recordPlacement } from '#api/features/placements/record-placement.service.ts'
import { createRelease } from '#api/features/releases/releases.service.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { groundStateOf } from '#shared/domain/ground-state.ts'
import type { GroundState } from '#shared/domain/ground-state.ts'
import type { CreatePlacement } from '#shared/schemas/placement.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import type { TestApp } from '#tests/setup/api.ts'

/** Runs a service as the site's lead, as a route would. */
export function asLead<T>(app: TestApp, open: OpenSite, work: (write: SiteWrite) => Promise<T>): Promise<T> {
  return writeToSite(app.deps, { siteId: open.siteId, userId: open.people['qc-lead'].user.id, authorize: () => true }, work)
}

/** Whole cells of lift 1 placed an hour ago. */
export function placeCells(app: TestApp, open: OpenSite, cells: readonly number[], overrides: Partial<CreatePlacement> = {}) {
  return asLead(app, open, (write) =>
    recordPlacement(write, {
      id: randomUUID(),
      zoneId: open.site.zones[0]?.id ?? '',
      lift: 1,
      cells: cells.map((cell) => ({ cell, quarters: 15 })),
      materialId: open.material.id,
      happenedAt: new Date(Date.now() - 3_600_000).toISOString(),
      loads: 0,
      loadVolumeCm3: 0,
      looseThicknessUm: null,
      machine: '',
      passes: null,
      remarks: '',
      coverReason: 'The foundation is inspected elsewhere',
      ...overrides,
    }),
  )
}

/** The lead releases cells of lift 1. */
export function releaseCells(app: TestApp, open: OpenSite, cells: readonly number[], overrideReason: string | null = null) {
  const zoneId = open.site.zones[0]?.id ?? ''
  return asLead(app, open, (write) =>
    createRelease(write, { id: randomUUID(), zoneId, lift: 1, cells: [...cells], happenedAt: new Date().toISOString(), overrideReason, remarks: '' }),
  )
}

/** The rework of an order is reported done. */
export function reportRework(app: TestApp, open: OpenSite, orderId: string, lots: readonly string[], reportedAt = new Date()) {
  return asLead(app, open, async (write) => {
    await write.manager.update(ReworkOrderEntity, { siteId: open.siteId, id: orderId }, { state: 'ready', reportedAt })
    await addOrderStep(write, orderId, { kind: 'ready', happenedAt: reportedAt, text: 'Done', details: {} })
    await changeGround(write, await loadSitePlan(write.manager, open.siteId), { lots })
  })
}

/** State of each placed cell of a lift, by cell. */
export async function statesOf(app: TestApp, open: OpenSite, lift = 1): Promise<Record<number, GroundState>> {
  const rows: { cell: number; state: number }[] = await app.dataSource.query('SELECT `cell`, `state` FROM `cell_lift` WHERE `site_id` = ? AND `lift` = ?', [open.siteId, lift])
  return Object.fromEntries(rows.map((row) => [row.cell, groundStateOf(row.state)]))
}
