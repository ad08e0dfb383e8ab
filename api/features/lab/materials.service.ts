import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { presentMaterial } from '#api/features/lab/materials.queries.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { CreateMaterial, Material, UpdateMaterial } from '#shared/schemas/lab.ts'

/** Records a borrow material; its name is its own on the site. */
export async function createMaterial(write: SiteWrite, input: CreateMaterial): Promise<Material> {
  const { manager, siteId, now } = write
  if (await manager.existsBy(BorrowMaterialEntity, { siteId, name: input.name })) {
    throw conflict(`This site already has a material called ${input.name}. Nothing was saved; give this one another name.`)
  }
  const material: BorrowMaterialEntity = { siteId, ...input, gs: input.gs ?? null, gsMeasured: input.gsMeasured ?? false, createdAt: now, updatedAt: now }
  await manager.insert(BorrowMaterialEntity, material)
  const { id, ...body } = input
  write.record('material.recorded', { type: 'material', id }, body)
  write.changed('material', id)
  return presentMaterial(await manager.findOneByOrFail(BorrowMaterialEntity, { siteId, id }))
}

/** Changes a material's facts; what is left out stays. Fill placed already keeps the volumes it was counted with. */
export async function updateMaterial(write: SiteWrite, id: string, input: UpdateMaterial): Promise<Material> {
  const { manager, siteId, now } = write
  const material = await manager.findOneBy(BorrowMaterialEntity, { siteId, id })
  if (!material) throw notFound()
  const before = factsOf(material)
  const after = { ...before, ...Object.fromEntries(Object.entries(input).filter(([, value]) => value !== undefined)) }
  if (after.name !== before.name && (await manager.existsBy(BorrowMaterialEntity, { siteId, name: after.name }))) {
    throw conflict(`This site already has a material called ${after.name}. Nothing was saved; give this one another name.`)
  }
  await manager.update(BorrowMaterialEntity, { siteId, id }, { ...after, updatedAt: now })
  write.record('material.updated', { type: 'material', id }, { before, after })
  write.changed('material', id)
  return presentMaterial(await manager.findOneByOrFail(BorrowMaterialEntity, { siteId, id }))
}

function factsOf({ name, source, classification, swellPercent, shrinkPercent, gs, gsMeasured }: BorrowMaterialEntity) {
  return { name, source, classification, swellPercent, shrinkPercent, gs, gsMeasured }
}
