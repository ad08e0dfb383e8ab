import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { CalibrationEntity } from '#api/entities/calibration.entity.ts'
import { refuseIf } from '#api/http/refuse-input.ts'
import { calibratedReading } from '#shared/domain/calibrated-reading.ts'
import type { RawSheet } from '#shared/domain/field-sheets.ts'
import type { Reason } from '#shared/domain/result.ts'

/**
 * Holds a sheet to the calibrations it names: another site's, a void one and one of another apparatus are refused; one out of
 * date that day, or whose value is not the one on the sheet, is flagged.
 */
export async function calibrationFlags(manager: EntityManager, siteId: string, sheet: RawSheet, sampledAt: Date): Promise<Reason[]> {
  const ids = 'calibrationIds' in sheet ? (sheet.calibrationIds ?? []) : []
  if (ids.length === 0) return []
  const rows = await manager.findBy(CalibrationEntity, { siteId, id: In([...ids]) })
  const found = new Map(rows.map((row) => [row.id, row]))
  const path = 'body.sheet.calibrationIds'
  refuseIf(
    ids.flatMap((id) => {
      const row = found.get(id)
      if (!row) return [{ path, message: 'That calibration is not one of this site’s. Choose one from the list.' }]
      if (row.voidedAt !== null) return [{ path, message: `The calibration of ${row.apparatus} is void. Choose another; what you entered was kept.` }]
      return calibratedReading(sheet, row) === null ? [{ path, message: `The calibration of ${row.apparatus} does not belong to this method.` }] : []
    }),
  )
  return rows.flatMap((row) => flagsOf(row, sheet, sampledAt))
}

function flagsOf(row: CalibrationEntity, sheet: RawSheet, sampledAt: Date): Reason[] {
  const flags: Reason[] = []
  if (row.validUntil !== null && sampledAt > row.validUntil) {
    flags.push({ code: 'calibration-expired', message: `The calibration of ${row.apparatus} was out of date when this was sampled.` })
  }
  if (sampledAt < row.performedAt) {
    flags.push({ code: 'calibration-later', message: `${row.apparatus} was calibrated only after this was sampled.` })
  }
  if (calibratedReading(sheet, row)?.differs === true) {
    flags.push({ code: 'calibration-differs', message: `The sheet does not carry the value that ${row.apparatus} was calibrated to.` })
  }
  return flags
}
