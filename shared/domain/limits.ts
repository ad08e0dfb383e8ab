import type { DensityUnit } from '#shared/units/density.ts'

/** A step of a minimum that depends on the curve's maximum: applies below `belowMaxDryPcf`, the last one to all the rest. */
export type CompactionStep = { readonly belowMaxDryPcf?: number | undefined; readonly text: string }

/**
 * One limit of a specification, kept as it is written: "95" and "95.0" are read differently (ASTM E29).
 * Compaction, saturation and air voids in percent; the moisture band in points from optimum.
 */
export type Criterion =
  | { readonly kind: 'rc-min'; readonly text: string }
  | { readonly kind: 'rc-max'; readonly text: string }
  | { readonly kind: 'rc-min-steps'; readonly steps: readonly CompactionStep[] }
  | { readonly kind: 'moisture-band'; readonly lowText: string; readonly highText: string }
  | { readonly kind: 'saturation-min'; readonly text: string }
  | { readonly kind: 'saturation-max'; readonly text: string }
  | { readonly kind: 'air-voids-max'; readonly text: string }
  | { readonly kind: 'dry-density-min'; readonly text: string; readonly unit: DensityUnit }

export type CriterionKind = Criterion['kind']
