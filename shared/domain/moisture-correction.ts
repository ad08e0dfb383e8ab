import { gaugeCorrectionK } from '#shared/domain/moisture.ts'
import type { Result } from '#shared/domain/result.ts'

/** One place read by the gauge and dried in the oven, percent of dry mass; the gauge's own is uncorrected. */
export interface MoisturePair {
  readonly oven: number
  readonly gauge: number
}

export interface MoistureCorrection {
  /** mean of the pairs' K */
  readonly k: number
  readonly least: number
  readonly greatest: number
  readonly pairs: readonly number[]
}

/**
 * The site correction of a gauge for a material from paired moistures: the mean of K = 1000 (w − wg) / (100 + wg) over the
 * pairs (formula from memory; averaging several places is common practice), with its spread.
 * @param pairs one or more, 0 to 500 percent
 */
export function moistureCorrection(pairs: readonly MoisturePair[]): Result<MoistureCorrection> {
  if (pairs.length === 0) return { ok: false, reason: { code: 'no-pairs', message: 'Give at least one pair of oven and gauge moisture.' } }
  const isMoisture = (value: number) => Number.isFinite(value) && value >= 0 && value <= 500
  if (!pairs.every(({ oven, gauge }) => isMoisture(oven) && isMoisture(gauge))) {
    return { ok: false, reason: { code: 'moisture-range', message: 'Moisture is a percentage of the dry mass, 0 to 500.' } }
  }
  const ks = pairs.map(({ oven, gauge }) => gaugeCorrectionK(oven, gauge))
  return { ok: true, value: { k: ks.reduce((sum, k) => sum + k, 0) / ks.length, least: Math.min(...ks), greatest: Math.max(...ks), pairs: ks } }
}
