import type { Lot } from '#shared/schemas/lot.ts'

/** Tests of a lot that nobody has gone to, drawn a stake for, or is to run again. */
export function stakesToDraw({ owed, staked, reruns }: Lot): number {
  return Math.max(0, owed - staked - reruns)
}
