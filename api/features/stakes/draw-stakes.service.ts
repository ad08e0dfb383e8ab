import { randomUUID } from 'node:crypto'
import { IsNull } from 'typeorm'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { StakeEntity } from '#api/entities/stake.entity.ts'
import { conflict, invalid } from '#api/errors.ts'
import { deriveLotNow } from '#api/features/ground/change-ground.ts'
import type { DerivedLot } from '#api/features/ground/change-ground.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { listStakes } from '#api/features/stakes/stakes.queries.ts'
import { boundaryRing, cellOutline } from '#api/features/tests/locate-test.ts'
import { cellSideMm, gridToSite } from '#shared/domain/grid.ts'
import { drawStakes as drawPoints } from '#shared/domain/stakes.ts'
import type { StakeCell } from '#shared/domain/stakes.ts'
import type { DrawStakes, DrawStakesAnswer } from '#shared/schemas/lot.ts'

/**
 * Draws a stake for every test a lot owes that has none: the place of each by stratified random location. Seed and steps go
 * into the event, so that nobody can foresee a draw and anyone can repeat it.
 * @param seed 32 hexadecimal digits, fresh at the moment of the draw
 */
export async function drawStakes(write: SiteWrite, { id, lotId }: DrawStakes, seed: string): Promise<DrawStakesAnswer> {
  const { manager, siteId, user, now } = write
  const known = await manager.findOneBy(LotEntity, { siteId, id: lotId, mergedInto: IsNull() })
  if (!known) throw invalid('That lot is not on this site any more. Reload and choose it again; nothing was drawn.')
  const plan = await loadSitePlan(manager, siteId)
  const lot = await deriveLotNow(manager, plan, lotId)
  const standing = await manager.find(StakeEntity, { where: { siteId, lotId, retiredAt: IsNull() }, order: { seq: 'ASC' } })
  const owed = lot.derived.toStake
  if (owed === 0) throw conflict(`${known.name} owes no test that needs a stake. Nothing was drawn.`)
  if (owed <= standing.length) throw conflict(`Every test that ${known.name} owes has its stake already. Nothing was drawn.`)

  const setbackMm = lot.specification.body.stakeSetbackMm
  const points = drawPoints({ owed, standing, cells: stakeCells(plan, lot), sideMm: cellSideMm(plan.site.grid), setbackMm, seed })
  const label = await freeLabels(write)
  const drawn = points.map(({ cell, u, v, step }): { stake: StakeEntity; step: object } => {
    const place = gridToSite(plan.site.grid, { u, v })
    return {
      stake: {
        siteId,
        id: randomUUID(),
        seq: write.take('stake'),
        label: label(),
        lotId,
        cell,
        u,
        v,
        ...place,
        drawnAt: now,
        drawnBy: user.id,
        retiredAt: null,
        retiredBy: null,
        createdAt: now,
        updatedAt: now,
      },
      step,
    }
  })
  await manager.insert(StakeEntity, drawn.map(({ stake }) => stake))
  write.record('stake.drawn', { type: 'lot', id: lotId }, {
    drawId: id,
    lot: known.name,
    seed,
    owed,
    standing: standing.map((stake) => ({ label: stake.label, cell: stake.cell })),
    setbackMm,
    stakes: drawn.map(({ stake, step }) => ({ id: stake.id, label: stake.label, cell: stake.cell, u: stake.u, v: stake.v, easting: stake.easting, northing: stake.northing, step })),
  })
  for (const { stake } of drawn) write.changed('stake', stake.id)
  write.changed('lot', lotId)
  const ids = new Set(drawn.map(({ stake }) => stake.id))
  const stakes = (await listStakes(manager, siteId, lotId)).filter((stake) => ids.has(stake.id))
  return { id, revision: write.revision, stakes }
}

function stakeCells(plan: SitePlan, { facts, derived }: DerivedLot): StakeCell[] {
  const boundary = boundaryRing(plan)
  const unspoken = new Map(derived.cells.map((cell) => [cell.cell, Math.max(0, cell.volumeCm3 - cell.spokenCm3)]))
  return facts.cells.map(({ cell, column, row }) => ({ cell, column, row, outline: cellOutline(plan, boundary, cell), unspokenCm3: unspoken.get(cell) ?? 0 }))
}

/** N1, N2, … leaving out what a standing stake of the site is called. */
async function freeLabels({ manager, siteId }: SiteWrite): Promise<() => string> {
  const taken = new Set((await manager.findBy(StakeEntity, { siteId, retiredAt: IsNull() })).map((stake) => stake.label))
  let number = 0
  return () => {
    do number++
    while (taken.has(`N${number}`))
    return `N${number}`
  }
}
