import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { StakeEntity } from '#api/entities/stake.entity.ts'
import type { ExchangeReferences } from '#api/features/test-exchange/exchange-references.ts'
import type { RawSheet } from '#shared/domain/field-sheets.ts'
import type { ExchangeTest } from '#shared/exchange/write-row.ts'

export interface StoredTest {
  readonly entity: FieldTestEntity
  /** as files carry it */
  readonly test: ExchangeTest
}

/** Tests on record as files carry them, in the order of the ids; those that are not here are left out. */
export async function loadStoredTests(manager: EntityManager, siteId: string, ids: readonly string[], references: ExchangeReferences): Promise<StoredTest[]> {
  if (ids.length === 0) return []
  const found = new Map((await manager.findBy(FieldTestEntity, { siteId, id: In([...ids]) })).map((entity) => [entity.id, entity]))
  const stakeIds = [...found.values()].flatMap(({ stakeId }) => stakeId ?? [])
  const stakes = stakeIds.length === 0 ? [] : await manager.findBy(StakeEntity, { siteId, id: In(stakeIds) })
  const labels = new Map(stakes.map(({ id, label }) => [id, label]))
  const name = namesOf(references)
  return ids.flatMap((id) => {
    const entity = found.get(id)
    return entity ? [{ entity, test: asExchanged(entity, { ...name, stake: (stakeId) => labels.get(stakeId) ?? null }) }] : []
  })
}

interface Names {
  curve(id: string): string
  gauge(id: string | undefined): string | null
  calibration(id: string): ExchangeTest['calibrations'][number] | undefined
  stake(id: string): string | null
}

function namesOf({ curves, gauges, calibrations }: ExchangeReferences): Omit<Names, 'stake'> {
  const codes = new Map(curves.map(({ id, code }) => [id, code]))
  const serials = new Map(gauges.map(({ id, serial }) => [id, serial]))
  const performed = new Map(calibrations.map(({ id, apparatus, performedAt }) => [id, { apparatus, performedAt: performedAt.toISOString() }]))
  return { curve: (id) => codes.get(id) ?? '', gauge: (id) => (id === undefined ? null : (serials.get(id) ?? null)), calibration: (id) => performed.get(id) }
}

function asExchanged(entity: FieldTestEntity, name: Names): ExchangeTest {
  const { sheet, followsId, followKind } = entity
  const ids = 'calibrationIds' in sheet ? (sheet.calibrationIds ?? []) : []
  return {
    id: entity.id,
    purpose: entity.purpose,
    follows: followsId !== null && followKind !== null ? { kind: followKind, record: followsId, number: null } : null,
    stake: entity.stakeId === null ? null : name.stake(entity.stakeId),
    place: { easting: entity.easting, northing: entity.northing },
    lift: entity.lift,
    liftConfirmed: entity.flags.some(({ code }) => code === 'lift-confirmed'),
    surfaceUm: entity.surfaceUm,
    depthUm: entity.depthUm,
    sampledAt: entity.sampledAt.toISOString(),
    curve: name.curve(entity.curveId),
    oversizePercent: entity.oversizePercent,
    sheet: withoutIds(sheet),
    gauge: sheet.method === 'nuclear-gauge' ? name.gauge(sheet.gaugeId) : null,
    moistureGauge: sheet.moisture.method === 'gauge' ? name.gauge(sheet.moisture.gaugeId) : null,
    calibrations: ids.flatMap((id) => name.calibration(id) ?? []),
    remarks: entity.remarks,
  }
}

/** The readings alone: the ids of this site mean nothing elsewhere. */
function withoutIds(sheet: RawSheet): RawSheet {
  const copy = structuredClone(sheet) as RawSheet & { gaugeId?: string; calibrationIds?: readonly string[] }
  const moisture = copy.moisture as RawSheet['moisture'] & { gaugeId?: string }
  delete copy.gaugeId
  delete copy.calibrationIds
  delete moisture.gaugeId
  return copy
}
