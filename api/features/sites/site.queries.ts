import { MembershipEntity } from '#api/entities/membership.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { SpecificationEntity } from '#api/entities/specification.entity.ts'
import { ZoneEntity } from '#api/entities/zone.entity.ts'
import type { Deps } from '#api/deps.ts'
import { loadGroundTotals } from '#api/features/ground/ground-totals.queries.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteRead } from '#api/features/site-head/site-write.ts'
import { readSite } from '#api/features/site-head/write-to-site.ts'
import { cellColumns } from '#api/features/sites/cell-columns.ts'
import type { CellGeometry } from '#shared/domain/site-geometry.ts'
import type { Site, SiteListItem, Specification, Zone } from '#shared/schemas/site.ts'

export function presentSpecification({ id, version, body, createdAt }: SpecificationEntity): Specification {
  return { ...body, id, version, createdAt: createdAt.toISOString() }
}

/** The site as one of its people sees it. */
export async function presentSite({ manager, siteId, role, revision, now }: SiteRead, cells: readonly CellGeometry[]): Promise<Site> {
  const site = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const zones = await manager.find(ZoneEntity, { where: { siteId }, order: { position: 'ASC' } })
  const specifications = await manager.find(SpecificationEntity, { where: { siteId }, order: { version: 'ASC' } })
  const inForce = new Map(specifications.map((specification) => [specification.zoneId, specification]))
  const { id, name, subtitle, crsCode, unitSystem, timeZone, dayCutHour, verticalDatum, waterDensity, grid, boundary } = site
  return {
    id,
    name,
    subtitle,
    role,
    crs: crsCode,
    unitSystem,
    timeZone,
    dayCutHour,
    verticalDatum,
    waterDensity,
    grid,
    boundary: [...boundary],
    areaMm2: areaOf(cells),
    zones: zones.flatMap((zone) => {
      const specification = inForce.get(zone.id)
      return specification ? [presentZone(zone, specification)] : []
    }),
    cellsHash: cellColumns(cells).hash,
    revision,
    now: now.toISOString(),
  }
}

function presentZone(zone: ZoneEntity, specification: SpecificationEntity): Zone {
  const { id, name, shortName, purpose, ring, liftPlan, holds, volumeBasis, lotBasis, position, minBaseUm, maxDesignUm, designCm3 } = zone
  return {
    id,
    name,
    shortName,
    purpose,
    ring: [...ring],
    liftPlan,
    holds,
    volumeBasis,
    lotBasis,
    index: position,
    minBaseUm,
    maxDesignUm,
    designCm3,
    specification: presentSpecification(specification),
  }
}

function areaOf(cells: readonly CellGeometry[]): number {
  return cells.reduce((sum, cell) => sum + cell.areaMm2, 0)
}

/** The sites a person belongs to, by name, each with its figures. */
export async function listSites(deps: Deps, userId: string): Promise<SiteListItem[]> {
  const memberships = await deps.dataSource.manager.findBy(MembershipEntity, { userId })
  const items: SiteListItem[] = []
  for (const { siteId } of memberships) {
    items.push(await readSite(deps, { siteId, userId, verb: 'site.see' }, listItem))
  }
  return items.sort((a, b) => a.name.localeCompare(b.name, 'en') || (a.id < b.id ? -1 : 1))
}

async function listItem({ manager, siteId, role, now }: SiteRead): Promise<SiteListItem> {
  const plan = await loadSitePlan(manager, siteId)
  const { id, name, subtitle, unitSystem, grid } = plan.site
  return {
    id,
    name,
    subtitle,
    role,
    unitSystem,
    areaMm2: areaOf(plan.cells),
    cells: plan.cells.length,
    totals: await loadGroundTotals(manager, plan, now),
    columns: grid.columns,
    rows: grid.rows,
  }
}
