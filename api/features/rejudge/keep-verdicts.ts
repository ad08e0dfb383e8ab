import { In } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import type { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { SpecificationEntity } from '#api/entities/specification.entity.ts'
import { TestMarkEntity } from '#api/entities/test-mark.entity.ts'
import { TestVerdictEntity } from '#api/entities/test-verdict.entity.ts'
import { canonicalJson } from '#api/features/site-head/canonical-json.ts'
import type { CurvePair } from '#api/features/rejudge/curve-pair.ts'
import type { Replanned } from '#api/features/rejudge/plan-rejudging.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { curveFlags } from '#api/features/tests/judge-sheet.ts'
import { groupBy } from '#shared/domain/group-by.ts'
import type { Reason } from '#shared/domain/result.ts'

/** Flags that are about the curve a test was judged by, and fall with it. */
const ABOUT_CURVE: readonly string[] = ['curve-draft', 'curve-superseded', 'curve-other-material', 'one-point-off']

/** The flags of a test under its new curve, which is of the same material as the old one. */
function flagsUnder(by: ReferenceCurveEntity, flags: readonly Reason[]): Reason[] {
  const otherMaterial = flags.some((flag) => flag.code === 'curve-other-material')
  return [...flags.filter((flag) => !ABOUT_CURVE.includes(flag.code)), ...curveFlags(by, otherMaterial ? '' : null)]
}

/**
 * Stores the new verdicts as the ones in force and keeps the old ones; the first one is written with the second.
 * @returns the new verdict's version by test
 */
export async function keepVerdicts(write: SiteWrite, planned: readonly Replanned[], { by }: CurvePair, reason: string): Promise<ReadonlyMap<string, number>> {
  const { manager, siteId, user, now } = write
  const ids = planned.map(({ test }) => test.id)
  const kept = await manager.find(TestVerdictEntity, { where: { siteId, testId: In(ids) }, order: { version: 'ASC' }, select: { testId: true, version: true, specificationId: true } })
  const versions = groupBy(kept, (row) => row.testId)
  const marks = groupBy(await manager.find(TestMarkEntity, { where: { siteId, testId: In(ids) }, order: { cell: 'ASC' } }), (row) => row.testId)
  const specificationOf = await loadSpecifications(write, planned)
  const rows = planned.flatMap(({ test, verdict, effect }): TestVerdictEntity[] => {
    const before = versions.get(test.id) ?? []
    const specificationId = before.at(-1)?.specificationId ?? specificationOf(test)
    const marked = [...groupBy(marks.get(test.id) ?? [], (row) => row.kind)].map(([kind, own]) => ({ kind, cells: own.map((row) => row.cell) }))
    const row = { siteId, testId: test.id, specificationId }
    const first = { ...row, version: 1, curveId: test.curveId, verdict: test.verdict, marks: marked, judgedAt: test.recordedAt, judgedBy: test.recordedBy, reason: null }
    const next = { ...row, version: Math.max(1, before.length) + 1, curveId: by.id, verdict, marks: effect.marks === 'keep' ? marked : [], judgedAt: now, judgedBy: user.id, reason }
    return before.length === 0 ? [first, next] : [next]
  })
  await manager.insert(TestVerdictEntity, rows as never)
  for (const { test, verdict } of planned) {
    const flags = flagsUnder(by, test.flags)
    const { outcome, treatedAsFail, near, headline, rc, moistureDeviation } = verdict
    await manager.update(
      FieldTestEntity,
      { siteId, id: test.id },
      { curveId: by.id, outcome, treatedAsFail, near, headline, rc, moistureDeviation, verdict: verdict as never, flags: flags as never, updatedAt: now },
    )
  }
  return new Map(rows.map((row) => [row.testId, row.version]))
}

/** The version of a zone's specification that has a test's frozen limits. */
async function loadSpecifications({ manager, siteId }: SiteWrite, planned: readonly Replanned[]) {
  const zones = [...new Set(planned.map(({ test }) => test.zoneId))]
  const specifications = await manager.find(SpecificationEntity, { where: { siteId, zoneId: In(zones) }, order: { version: 'ASC' } })
  const limits = ({ criteria, rounding, repeatability }: Pick<SpecificationEntity['body'], 'criteria' | 'rounding' | 'repeatability'> | FieldTestEntity['verdict']['against']) => canonicalJson({ criteria, rounding, repeatability })
  return (test: FieldTestEntity): string | null => {
    const own = limits(test.verdict.against)
    return specifications.findLast(({ zoneId, body }) => zoneId === test.zoneId && limits(body) === own)?.id ?? null
  }
}
