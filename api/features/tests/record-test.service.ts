import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import type { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { TestMarkEntity } from '#api/entities/test-mark.entity.ts'
import { calibrationFlags } from '#api/features/calibrations/used-calibrations.ts'
import { changeGround, deriveLotNow } from '#api/features/ground/change-ground.ts'
import { withdrawOrder } from '#api/features/ground/order-records.ts'
import { orderNumber } from '#api/features/ground/order-steps.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import { loadLotsOfCells } from '#api/features/lots/lots-of-cells.queries.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { retireIdleStakes, retireStakes } from '#api/features/stakes/retire-stakes.ts'
import { continueOrder, findOpenOrder, issueOrder, orderCells } from '#api/features/tests/failure-order.ts'
import { curveFlags, judgeOrRefuse, loadCurve } from '#api/features/tests/judge-sheet.ts'
import { checkLift, placeTest } from '#api/features/tests/locate-test.ts'
import { failedCells, marksOf } from '#api/features/tests/mark-ground.ts'
import type { GroundMark } from '#api/features/tests/mark-ground.ts'
import { refuseUnnamedGauge } from '#api/features/tests/named-gauge.ts'
import { refutes } from '#api/features/tests/refute-failure.ts'
import { checkFollowing, loadChain, wasReworkReported } from '#api/features/tests/test-chain.ts'
import type { Chain } from '#api/features/tests/test-chain.ts'
import { authorizeRecording } from '#api/features/tests/test-rights.ts'
import { checkStakes } from '#api/features/tests/test-stakes.ts'
import { gaugeIdOf } from '#shared/domain/gauge-check.ts'
import type { Reason } from '#shared/domain/result.ts'
import { formatTestNumber, nextChainName } from '#shared/domain/retest-chain.ts'
import type { CreateTest, RecordTestAnswer } from '#shared/schemas/field-test.ts'

/**
 * Records a field test: places and judges it, freezes the verdict, marks the ground of a failure and issues or reopens
 * its rework order, retires the stake it was taken at, and derives the lots it touches again.
 */
export async function recordTest(write: SiteWrite, input: CreateTest): Promise<RecordTestAnswer> {
  authorizeRecording(write.role, input.purpose)
  const plan = await loadSitePlan(write.manager, write.siteId)
  const assessed = await assessTest(write, plan, input)
  const { cell, at, verdict, chain, order, stakes, lot } = assessed
  const test = await insertTest(write, input, assessed)
  const marks = marksOf({ verdict, purpose: input.purpose, cell, at, replacesId: chain?.current?.id ?? null, lot })
  await storeMarks(write, test, marks)
  const standing = await settleOrder(write, plan, { test, order, marks, refuted: assessed.refuted === 'refuted' })
  await retireStakes(write, stakes, test.number)
  tellRecorded(write, plan, input, { test, assessed, marks, standing })

  const inOrder = order ? await orderCells(write, order.id) : []
  const touched = [cell, ...marks.flatMap((mark) => mark.cells), ...(chain?.tests.map((other) => other.cell) ?? []), ...inOrder]
  const lots = await loadLotsOfCells(write.manager, write.siteId, input.lift, touched)
  const change = await changeGround(write, plan, { lots, from: input.at })
  await retireIdleStakes(write, change.lots.values())
  return {
    id: test.id,
    number: test.number,
    outcome: verdict.outcome,
    headline: verdict.headline,
    revision: write.revision,
    marked: marks.reduce((sum, mark) => sum + mark.cells.length, 0),
    orderId: standing?.id ?? null,
    orderNumber: standing ? orderNumber(standing.seq) : null,
  }
}

export type Assessed = Awaited<ReturnType<typeof assessTest>>

/**
 * Everything a test is before it is stored: its place, verdict, chain, stake and what is to be told about it.
 * @param follows the chain it follows on, where that is not on record yet
 */
export async function assessTest({ manager, siteId, now }: Pick<SiteWrite, 'manager' | 'siteId' | 'now'>, plan: SitePlan, input: CreateTest, follows?: Chain | null) {
  const sampledAt = notInFuture(new Date(input.sampledAt), now, 'body.sampledAt')
  await refuseUnnamedGauge(manager, siteId, input)
  const { cell, zone, at } = placeTest(plan, input)
  const curve = await loadCurve(manager, siteId, input.curveId)
  const [lotId] = await loadLotsOfCells(manager, siteId, input.lift, [cell])
  const lot = lotId === undefined ? undefined : await deriveLotNow(manager, plan, lotId)
  const specification = lot?.specification ?? zone.specification
  const { reduced, verdict } = judgeOrRefuse(input, plan, curve, specification)
  const liftFlags = checkLift(plan, cell, input)
  const chain = follows === undefined ? await loadChain(manager, siteId, input.follows) : follows
  const reworkReported = chain !== null && (await wasReworkReported(manager, siteId, chain.id, sampledAt))
  const chainFlags = chain ? checkFollowing(chain, { ...input, zoneId: zone.id, at, sampledAt, reworkReported }) : []
  const stakes = await checkStakes(manager, siteId, { ...input, at, zone, lotId, rules: specification.body })
  const order = chain ? await findOpenOrder({ manager, siteId }, chain.tests) : null
  const refuted = order && chain ? refutes(chain, { ...input, verdict, elsewhere: chainFlags.length > 0 }) : null
  const flags: Reason[] = [
    ...reduced.flags,
    ...(await calibrationFlags(manager, siteId, input.sheet, sampledAt)),
    ...liftFlags,
    ...chainFlags,
    ...stakes.flags,
    ...curveFlags(curve, lot?.lot.materialId ?? null),
    ...(refuted === 'cause-missing' ? [{ code: 'cause-not-recorded', message: 'The cause of the doubted reading is not recorded, so its order stays.' }] : []),
  ]
  return { sampledAt, cell, zoneId: zone.id, at, lot, specification, reduced, verdict, chain, order, refuted, stakes: stakes.retires, flags }
}

interface Recorded {
  readonly test: FieldTestEntity
  readonly assessed: Assessed
  readonly marks: readonly GroundMark[]
  readonly standing: ReworkOrderEntity | null
}

function tellRecorded(write: SiteWrite, plan: SitePlan, input: CreateTest, { test, assessed, marks, standing }: Recorded): void {
  const { outcome, treatedAsFail, near, headline, rc, moistureDeviation, reasons } = assessed.verdict
  write.record(
    'test.recorded',
    { type: 'test', id: test.id },
    {
      ...input,
      number: test.number,
      seq: test.seq,
      cell: plan.label(test.cell),
      lotId: assessed.lot?.lot.id ?? null,
      specificationId: assessed.specification.id,
      verdict: { outcome, treatedAsFail, near, headline, rc, moistureDeviation, reasons },
      marks: marks.map(({ kind, cells }) => ({ kind, cells: cells.map((cell) => plan.label(cell)) })),
      flags: test.flags.map((flag) => flag.code),
      orderNumber: standing ? orderNumber(standing.seq) : null,
      retiredStakes: assessed.stakes.map((stake) => stake.label),
    },
    test.sampledAt,
  )
  write.changed('test', test.id)
}

async function insertTest(write: SiteWrite, input: CreateTest, assessed: Assessed): Promise<FieldTestEntity> {
  const { manager, siteId, user, now } = write
  const { at, chain, reduced, verdict, cell, zoneId, sampledAt, flags } = assessed
  const [{ last }]: [{ last: number | null }] = await manager.query('SELECT MAX(`seq`) AS `last` FROM `field_test` WHERE `site_id` = ?', [siteId])
  const test: FieldTestEntity = {
    siteId,
    id: input.id,
    seq: Number(last ?? 0) + 1,
    number: nameOf(write, chain, input.follows),
    chainId: chain?.id ?? input.id,
    followsId: input.follows?.testId ?? null,
    followKind: input.follows?.kind ?? null,
    purpose: input.purpose,
    zoneId,
    lift: input.lift,
    cell,
    stakeId: input.stakeId,
    easting: input.at.easting,
    northing: input.at.northing,
    u: at.u,
    v: at.v,
    surfaceUm: input.surfaceUm,
    depthUm: input.depthUm,
    sampledAt,
    recordedAt: now,
    recordedBy: user.id,
    method: input.sheet.method,
    sheet: input.sheet,
    gaugeId: gaugeIdOf(input.sheet),
    oversizePercent: input.oversizePercent,
    curveId: input.curveId,
    remarks: input.remarks,
    outcome: verdict.outcome,
    treatedAsFail: verdict.treatedAsFail,
    near: verdict.near,
    headline: verdict.headline,
    wetDensity: reduced.wetDensity,
    dryDensity: reduced.dryDensity,
    moisture: reduced.moisture,
    rc: verdict.rc,
    moistureDeviation: verdict.moistureDeviation,
    verdict,
    flags,
    voidedAt: null,
    voidedBy: null,
    voidReason: null,
    createdAt: now,
    updatedAt: now,
  }
  await manager.insert(FieldTestEntity, test as never)
  return test
}

function nameOf(write: SiteWrite, chain: Chain | null, follows: CreateTest['follows']): string {
  if (!chain || !follows) return formatTestNumber(write.take('test'))
  const entries = chain.tests.map((test) => ({ name: test.number, isVoid: test.voidedAt !== null }))
  const name = nextChainName(entries, follows.kind === 'rerun' ? 're-run' : 'retest')
  if (name === null) throw new Error(`The chain of ${chain.followed.number} holds a foreign name`)
  return name
}

async function storeMarks({ manager, siteId }: SiteWrite, test: FieldTestEntity, marks: readonly GroundMark[]): Promise<void> {
  const rows = marks.flatMap(({ kind, cells }) => cells.map((cell) => ({ siteId, testId: test.id, cell, lift: test.lift, kind })))
  if (rows.length > 0) await manager.insert(TestMarkEntity, rows)
}

interface Settling {
  readonly test: FieldTestEntity
  readonly order: ReworkOrderEntity | null
  readonly marks: readonly GroundMark[]
  readonly refuted: boolean
}

/** The order the test stands under afterwards: issued, taken over, or none. */
async function settleOrder(write: SiteWrite, plan: SitePlan, { test, order, marks, refuted }: Settling): Promise<ReworkOrderEntity | null> {
  const cells = failedCells(marks)
  if (order && refuted) await withdrawOrder(write, order, `${test.number} refutes it: ${test.remarks}`)
  if (cells.length === 0) return refuted ? null : order
  if (!order) return issueOrder(write, plan, test, cells)
  await continueOrder(write, plan, order, test, cells)
  return order
}
