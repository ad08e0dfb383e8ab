import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { notFound } from '#api/errors.ts'
import { sheetFlags } from '#api/features/lab/curve-sheet.ts'
import { presentFit } from '#api/features/lab/fit-curve.ts'
import type { Curve } from '#shared/schemas/lab.ts'

export async function listCurves(manager: EntityManager, siteId: string): Promise<Curve[]> {
  const curves = await manager.find(ReferenceCurveEntity, { where: { siteId }, order: { code: 'ASC', id: 'ASC' } })
  return presentCurves(manager, siteId, curves)
}

export async function loadCurve(manager: EntityManager, siteId: string, id: string): Promise<Curve> {
  const [curve] = await presentCurves(manager, siteId, await manager.findBy(ReferenceCurveEntity, { siteId, id }))
  if (!curve) throw notFound()
  return curve
}

async function presentCurves(manager: EntityManager, siteId: string, curves: readonly ReferenceCurveEntity[]): Promise<Curve[]> {
  if (curves.length === 0) return []
  const { waterDensity } = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const materials = await manager.findBy(BorrowMaterialEntity, { siteId, id: In(curves.map((curve) => curve.materialId)) })
  const people = curves.flatMap(({ recordedBy, approvedBy, supersededBy }) => [recordedBy, approvedBy, supersededBy].filter((person) => person !== null))
  const users = await manager.find(UserEntity, { where: { id: In(people) }, select: { id: true, name: true } })
  const materialNames = new Map(materials.map(({ id, name }) => [id, name]))
  const userNames = new Map(users.map(({ id, name }) => [id, name]))
  const successors = curves.flatMap((curve) => curve.successorId ?? [])
  const codes = new Map((await manager.find(ReferenceCurveEntity, { where: { siteId, id: In(successors) }, select: { id: true, code: true } })).map(({ id, code }) => [id, code]))
  const judged = await countTests(manager, siteId, curves.map((curve) => curve.id))
  return curves.map((curve): Curve => {
    const { id, code, materialId, method, procedure, points, gs, gsMeasured, coarse, reported, status, maxDryDensity, optimumMoisture, entry, apparatus, withdrawReason } = curve
    return {
      id,
      code,
      materialId,
      materialName: materialNames.get(materialId) ?? '',
      method,
      procedure,
      points,
      entry,
      apparatus,
      flags: sheetFlags(curve),
      withdrawReason,
      gs,
      gsMeasured,
      coarse,
      reported,
      sampledAt: curve.sampledAt.toISOString(),
      status,
      fit: presentFit(curve, waterDensity),
      pair: maxDryDensity === null || optimumMoisture === null ? null : { maxDryDensity, optimumMoisture },
      pairFrom: curve.pairFrom,
      approvedBy: curve.approvedBy === null ? null : (userNames.get(curve.approvedBy) ?? ''),
      approvedAt: curve.approvedAt?.toISOString() ?? null,
      recordedBy: userNames.get(curve.recordedBy) ?? '',
      testsJudged: judged.get(id) ?? 0,
      superseded: presentSuperseded(curve, codes, userNames),
    }
  })
}

function presentSuperseded(
  { successorId, supersededAt, supersededBy, supersedeReason }: ReferenceCurveEntity,
  codes: ReadonlyMap<string, string>,
  people: ReadonlyMap<string, string>,
): Curve['superseded'] {
  if (successorId === null || supersededAt === null || supersededBy === null) return null
  return { by: { id: successorId, code: codes.get(successorId) ?? '' }, at: supersededAt.toISOString(), who: people.get(supersededBy) ?? '', reason: supersedeReason ?? '' }
}

async function countTests(manager: EntityManager, siteId: string, curveIds: readonly string[]): Promise<ReadonlyMap<string, number>> {
  const rows: { curveId: string; tests: string }[] = await manager.query(
    'SELECT `curve_id` AS `curveId`, COUNT(*) AS `tests` FROM `field_test` WHERE `site_id` = ? AND `voided_at` IS NULL AND `curve_id` IN (?) GROUP BY `curve_id`',
    [siteId, curveIds],
  )
  return new Map(rows.map(({ curveId, tests }) => [curveId, Number(tests)]))
}
