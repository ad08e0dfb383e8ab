/** A point of a laboratory compaction curve: percent and kg/m³. */
export type LabPoint = { readonly moisture: number; readonly dryDensity: number }
