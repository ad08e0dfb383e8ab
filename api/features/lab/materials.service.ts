import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { conflict } from '#api/errors.ts'
import { presentMaterial } from '#api/features/lab/materials.queries.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { CreateMaterial, Material } from '#shared/schemas/lab.ts'

/** Records a borrow material; its name is its own on the site. */
export async function createMaterial(write: SiteWrite, input: CreateMaterial): Promise<Material> {
  const { manager, siteId, now } = write
  if (await manager.existsBy(BorrowMaterialEntity, { siteId, name: input.name })) {
    throw conflict(`This site already has a material called ${input.name}. Nothing was saved; give this one another name.`)
  }
  const material: BorrowMaterialEntity = { siteId, ...input, createdAt: now, updatedAt: now }
  await manager.insert(BorrowMaterialEntity, material)
  const { id, ...body } = input
  write.record('material.recorded', { type: 'material', id }, body)
  write.changed('material', id)
  return presentMaterial(await manager.findOneByOrFail(BorrowMaterialEntity, { siteId, id }))
}
