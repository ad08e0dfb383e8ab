import type { Reason } from '#shared/domain/result.ts'

/**
 * How an offset for a trench or wall is signed. Makers differ (gauge operating manuals): block minus standard is the moisture count on
 * the block beside the wall minus the day's moisture standard count, and is subtracted; standard minus block is the same
 * with the opposite sign, and is added.
 */
export const WALL_CONVENTIONS = ['block-minus-standard', 'standard-minus-block'] as const
export type WallConvention = (typeof WALL_CONVENTIONS)[number]

/** The correction of a gauge's moisture beside a vertical face, as it was entered. */
export interface WallOffset {
  readonly convention: WallConvention
  /** `gauge`: the reading is corrected already, `offset` is the counts stored in the gauge. `here`: `offset` is a moisture density in the sheet's unit, and is applied by the reduction. */
  readonly appliedBy: 'gauge' | 'here'
  readonly offset: number
}

/**
 * The offset from a count on the block in the trench and the day's standard count (gauge operating manuals).
 * @returns counts, signed by the convention
 */
export function wallOffset(blockCount: number, standardCount: number, convention: WallConvention): number {
  return convention === 'block-minus-standard' ? blockCount - standardCount : standardCount - blockCount
}

/**
 * The moisture density without the wall's share: as read where the gauge has corrected it, else less the offset (block minus
 * standard) or plus it (standard minus block).
 * @param moistureDensity as read, in the unit of an offset that is applied here
 * @returns same unit; below zero when the offset is greater than the reading
 */
export function moistureBesideWall(moistureDensity: number, wall: WallOffset | undefined): number {
  if (wall === undefined || wall.appliedBy === 'gauge') return moistureDensity
  return wall.convention === 'block-minus-standard' ? moistureDensity - wall.offset : moistureDensity + wall.offset
}

/** A wall adds counts, so that an offset of the other sign is unlikely. @returns a flag, or none */
export function wallOffsetFlags({ convention, offset }: WallOffset): Reason[] {
  const added = convention === 'block-minus-standard' ? offset : -offset
  if (added >= 0) return []
  return [{ code: 'wall-offset-sign', message: `A wall adds water to the reading, so this offset is usually ${convention === 'block-minus-standard' ? 'above' : 'below'} zero. Check its sign.` }]
}
