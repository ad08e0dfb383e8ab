import { SiteEntity } from '#api/entities/site.entity.ts'
import { SpecificationEntity } from '#api/entities/specification.entity.ts'
import { ZoneEntity } from '#api/entities/zone.entity.ts'
import { notFound } from '#api/errors.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { refuseIf } from '#api/http/refuse-input.ts'
import { specificationProblems } from '#api/features/sites/site-problems.ts'
import { presentSpecification } from '#api/features/sites/site.queries.ts'
import type { CreateSpecification, Specification, UpdateSite } from '#shared/schemas/site.ts'

/** Changes name, subtitle or unit system; what is left out stays. Units only change what is shown, never what is stored. */
export async function updateSite(write: SiteWrite, input: UpdateSite): Promise<void> {
  const { manager, siteId, now } = write
  const { name, subtitle, unitSystem } = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const before = { name, subtitle, unitSystem }
  const after = { name: input.name ?? name, subtitle: input.subtitle ?? subtitle, unitSystem: input.unitSystem ?? unitSystem }
  if (after.name === name && after.subtitle === subtitle && after.unitSystem === unitSystem) return
  await manager.update(SiteEntity, { id: siteId }, { ...after, updatedAt: now })
  write.record('site.updated', { type: 'site', id: siteId }, { before, after })
  write.changed('site', siteId)
}

/** Puts a new version of a zone's specification in force; lots that are open keep the version they were made under. */
export async function createSpecification(write: SiteWrite, zoneId: string, input: CreateSpecification): Promise<Specification> {
  const { manager, siteId, user, now } = write
  const { id, ...body } = input
  const zone = await manager.findOneBy(ZoneEntity, { siteId, id: zoneId })
  if (!zone) throw notFound()
  refuseIf(specificationProblems(body, 'body'))
  const last = await manager.maximum(SpecificationEntity, 'version', { siteId, zoneId })
  const specification: SpecificationEntity = {
    siteId,
    id,
    zoneId,
    version: (last ?? 0) + 1,
    body,
    createdBy: user.id,
    createdAt: now,
    updatedAt: now,
  }
  await manager.insert(SpecificationEntity, specification)
  write.record('specification.created', { type: 'zone', id: zoneId }, { zone: zone.name, version: specification.version, specificationId: id, body })
  write.changed('zone', zoneId)
  return presentSpecification(specification)
}
