import type { EntityManager } from 'typeorm'
import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { looseToCompactedFactor } from '#shared/domain/volume-state.ts'
import type { Material } from '#shared/schemas/lab.ts'

export function presentMaterial({ id, name, source, classification, swellPercent, shrinkPercent, gs, gsMeasured }: BorrowMaterialEntity): Material {
  const looseToCompacted = looseToCompactedFactor({ swellPercent, shrinkPercent })
  return { id, name, source, classification, swellPercent, shrinkPercent, gs, gsMeasured, looseToCompacted }
}

export async function listMaterials(manager: EntityManager, siteId: string): Promise<Material[]> {
  const materials = await manager.find(BorrowMaterialEntity, { where: { siteId }, order: { name: 'ASC', id: 'ASC' } })
  return materials.map(presentMaterial)
}
