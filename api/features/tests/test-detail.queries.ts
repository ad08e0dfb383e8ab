import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { AllocationEntity } from '#api/entities/allocation.entity.ts'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { StakeEntity } from '#api/entities/stake.entity.ts'
import { TestMarkEntity } from '#api/entities/test-mark.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { notFound } from '#api/errors.ts'
import { loadGaugeChecks } from '#api/features/gauges/gauge-checks.queries.ts'
import { loadChainTests } from '#api/features/tests/test-chain.ts'
import { loadTestSummary } from '#api/features/tests/tests.queries.ts'
import { usesGauge } from '#shared/domain/gauge-check.ts'
import { groupBy } from '#shared/domain/group-by.ts'
import { rawSheetSchema } from '#shared/schemas/field-sheet.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'

/** A test with its raw sheet, frozen verdict, chain, marks and what it speaks for now. */
export async function loadTestDetail(manager: EntityManager, siteId: string, id: string): Promise<TestDetail> {
  const summary = await loadTestSummary(manager, siteId, id)
  if (!summary) throw notFound()
  const test = await manager.findOneByOrFail(FieldTestEntity, { siteId, id })
  const chain = await loadChainTests(manager, siteId, test.chainId)
  return {
    ...summary,
    follows: test.followsId !== null && test.followKind !== null ? { testId: test.followsId, kind: test.followKind } : null,
    chain: chain.map((other) => ({
      id: other.id,
      number: other.number,
      outcome: other.outcome,
      headline: other.headline,
      rc: other.rc,
      sampledAt: other.sampledAt.toISOString(),
      voided: other.voidedAt !== null,
    })),
    stakeLabel: test.stakeId === null ? null : ((await manager.findOneBy(StakeEntity, { siteId, id: test.stakeId }))?.label ?? null),
    surfaceUm: test.surfaceUm,
    depthUm: test.depthUm,
    recordedAt: test.recordedAt.toISOString(),
    oversizePercent: test.oversizePercent,
    wetDensity: test.wetDensity,
    sheet: rawSheetSchema.parse(test.sheet),
    remarks: test.remarks,
    verdict: presentVerdict(test),
    flags: [...test.flags],
    marks: await loadMarks(manager, siteId, id),
    speaksFor: await loadSpeaksFor(manager, siteId, id),
    orderId: await loadOrderId(manager, siteId, chain),
    gauge: await presentGauge(manager, siteId, test),
    void: await presentVoid(manager, test),
  }
}

/** The verdict as it was frozen; the schema of the answer takes what is shown of it. */
export function presentVerdict({ verdict }: Pick<FieldTestEntity, 'verdict'>): TestDetail['verdict'] {
  const { against, reasons, suspicions, advice, ...rest } = verdict
  return {
    ...rest,
    reasons: [...reasons],
    suspicions: [...suspicions],
    advice: [...advice],
    against: {
      ...against,
      criteria: against.criteria.map((criterion) => (criterion.kind === 'rc-min-steps' ? { ...criterion, steps: [...criterion.steps] } : criterion)),
    },
  }
}

async function loadMarks(manager: EntityManager, siteId: string, testId: string): Promise<TestDetail['marks']> {
  const rows = await manager.find(TestMarkEntity, { where: { siteId, testId }, order: { cell: 'ASC' } })
  return [...groupBy(rows, (row) => row.kind)].map(([kind, own]) => ({ kind, cells: own.map((row) => row.cell) }))
}

async function loadSpeaksFor(manager: EntityManager, siteId: string, testId: string): Promise<TestDetail['speaksFor']> {
  const rows = await manager.find(AllocationEntity, { where: { siteId, testId }, order: { cell: 'ASC' } })
  return [...groupBy(rows, (row) => row.cell)].map(([cell, own]) => ({ cell, cm3: own.reduce((sum, row) => sum + row.cm3, 0) }))
}

/** The last order that a test of the chain caused. */
async function loadOrderId(manager: EntityManager, siteId: string, chain: readonly FieldTestEntity[]): Promise<string | null> {
  const order = await manager.findOne(ReworkOrderEntity, { where: { siteId, causeTestId: In(chain.map((test) => test.id)) }, order: { seq: 'DESC' } })
  return order?.id ?? null
}

async function presentGauge(manager: EntityManager, siteId: string, test: FieldTestEntity): Promise<TestDetail['gauge']> {
  if (!usesGauge(test.sheet)) return null
  return (await loadGaugeChecks(manager, siteId, [test])).get(test.id) ?? null
}

async function presentVoid(manager: EntityManager, { voidedAt, voidedBy, voidReason }: FieldTestEntity): Promise<TestDetail['void']> {
  if (voidedAt === null || voidedBy === null) return null
  const { id, name } = await manager.findOneByOrFail(UserEntity, { id: voidedBy })
  return { at: voidedAt.toISOString(), by: { id, name }, reason: voidReason ?? '' }
}
