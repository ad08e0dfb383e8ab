import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { OnePointCheckEntity } from '#api/entities/one-point-check.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { notFound } from '#api/errors.ts'
import { onePointResultSchema, onePointSheetSchema } from '#shared/schemas/one-point.ts'
import type { OnePointCheck } from '#shared/schemas/one-point.ts'

/** O-003 of 3. */
export function onePointNumber(seq: number): string {
  return `O-${String(seq).padStart(3, '0')}`
}

/** Every one-point check of a site, newest first. */
export async function listOnePoints(manager: EntityManager, siteId: string): Promise<OnePointCheck[]> {
  return present(manager, siteId, await manager.find(OnePointCheckEntity, { where: { siteId }, order: { seq: 'DESC' } }))
}

export async function loadOnePoint(manager: EntityManager, siteId: string, id: string): Promise<OnePointCheck> {
  const [check] = await present(manager, siteId, await manager.findBy(OnePointCheckEntity, { siteId, id }))
  if (!check) throw notFound()
  return check
}

async function present(manager: EntityManager, siteId: string, checks: readonly OnePointCheckEntity[]): Promise<OnePointCheck[]> {
  if (checks.length === 0) return []
  const materials = await manager.findBy(BorrowMaterialEntity, { siteId, id: In(checks.map((check) => check.materialId)) })
  const tests = await manager.find(FieldTestEntity, { where: { siteId, id: In(checks.flatMap((check) => check.testId ?? [])) }, select: { id: true, number: true } })
  const people = checks.flatMap(({ recordedBy, voidedBy }) => (voidedBy === null ? [recordedBy] : [recordedBy, voidedBy]))
  const users = await manager.find(UserEntity, { where: { id: In(people) }, select: { id: true, name: true } })
  const materialNames = new Map(materials.map(({ id, name }) => [id, name]))
  const testNumbers = new Map(tests.map(({ id, number }) => [id, number]))
  const names = new Map(users.map(({ id, name }) => [id, name]))
  return checks.map((check): OnePointCheck => {
    const { id, curveId, testId, method, procedure, remarks, materialId, wetDensity, dryDensity, moisture, voidedAt, voidedBy } = check
    return {
      id,
      number: onePointNumber(check.seq),
      curveId,
      testId,
      method,
      procedure,
      sheet: onePointSheetSchema.parse(check.sheet),
      sampledAt: check.sampledAt.toISOString(),
      remarks,
      materialId,
      materialName: materialNames.get(materialId) ?? '',
      wetDensity,
      dryDensity,
      moisture,
      result: onePointResultSchema.parse(check.result),
      test: testId === null ? null : { id: testId, number: testNumbers.get(testId) ?? '' },
      recordedBy: { id: check.recordedBy, name: names.get(check.recordedBy) ?? '' },
      recordedAt: check.recordedAt.toISOString(),
      void: voidedAt === null || voidedBy === null ? null : { at: voidedAt.toISOString(), by: names.get(voidedBy) ?? '', reason: check.voidReason ?? '' },
    }
  })
}
