import type { EntityManager } from 'typeorm'
import { GaugeEntity } from '#api/entities/gauge.entity.ts'
import { refuseIf } from '#api/http/refuse-input.ts'
import { gaugeIdOf, usesGauge } from '#shared/domain/gauge-check.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'

/**
 * Refuses a gauge that is not of this site's register, and a gauge test that names none where the register has one. The
 * owner's verification may be read with a gauge of the owner's own.
 */
export async function refuseUnnamedGauge(manager: EntityManager, siteId: string, { sheet, purpose }: Pick<CreateTest, 'sheet' | 'purpose'>): Promise<void> {
  if (!usesGauge(sheet)) return
  const path = sheet.method === 'nuclear-gauge' ? 'body.sheet.gaugeId' : 'body.sheet.moisture.gaugeId'
  const id = gaugeIdOf(sheet)
  if (id !== null) {
    const known = await manager.existsBy(GaugeEntity, { siteId, id })
    refuseIf(known ? [] : [{ path, message: 'That gauge is not in this site’s register. Choose one from the list.' }])
    return
  }
  if (purpose === 'verification') return
  const registered = await manager.existsBy(GaugeEntity, { siteId })
  refuseIf(registered ? [{ path, message: 'Choose the gauge it was read with: its standard count of the day stands in the register.' }] : [])
}
