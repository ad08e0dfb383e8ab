import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import type { WallOffset } from '#shared/domain/wall-offset.ts'
import type { DensityUnit } from '#shared/units/density.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import type { VolumeUnit } from '#shared/units/volume.ts'

/** Oven (D2216) or microwave (D4643): the three weighings of a tin. */
export type TinMoistureSheet = {
  readonly method: 'oven' | 'microwave'
  readonly massUnit: MassUnit
  readonly wetAndTin: number
  /** the last weighing, at constant mass */
  readonly dryAndTin: number
  readonly tin: number
  /** weighings between wet and the last, oldest first, by which constant mass is seen; left out where none was written down */
  readonly earlier?: readonly number[] | undefined
}

/** Calcium carbide pressure tester (D4944): the dial reads percent of the *wet* mass. */
export type CarbideMoistureSheet = { readonly method: 'carbide'; readonly readingPercent: number }

/** Nuclear gauge moisture: water per volume as read, with the site's correction K (0 where there is none). */
export type GaugeMoistureSheet = {
  readonly method: 'gauge'
  readonly densityUnit: DensityUnit
  readonly moistureDensity: number
  readonly correctionK: number
  /** Beside a wall or in a trench: what was done about the water in the face. */
  readonly wall?: WallOffset | undefined
  /** The gauge of the register, where the density was not read by it (then the sheet names it). */
  readonly gaugeId?: string | undefined
}

/** Moisture as a report states it, percent of dry mass. */
export type StatedMoistureSheet = { readonly method: 'stated'; readonly percent: number }

export type MoistureSheet = TinMoistureSheet | CarbideMoistureSheet | GaugeMoistureSheet | StatedMoistureSheet
export type MoistureMethod = MoistureSheet['method']

/** The calibrations of the apparatus whose values stand in a sheet, by their ids; the values themselves are kept beside. */
type Calibrated = { readonly calibrationIds?: readonly string[] | undefined }

/** Sand cone (D1556): weighings of the apparatus and of the soil dug, and the sand's bulk density. */
export type SandConeSheet = Calibrated & {
  readonly method: 'sand-cone'
  readonly massUnit: MassUnit
  readonly apparatusBefore: number
  readonly apparatusAfter: number
  readonly coneAndPlate: number
  readonly densityUnit: DensityUnit
  readonly sandDensity: number
  readonly moistSoil: number
  /** Largest particle seen in the hole, in `lengthUnit`; left out where it was not looked at. */
  readonly largestParticle?: number | undefined
  readonly lengthUnit?: LengthUnit | undefined
  readonly moisture: MoistureSheet
}

/** Rubber balloon (D2167): the volume indicator on the plate before digging and with the balloon in the hole. */
export type RubberBalloonSheet = Calibrated & {
  readonly method: 'rubber-balloon'
  readonly volumeUnit: VolumeUnit
  readonly volumeBefore: number
  readonly volumeAfter: number
  readonly massUnit: MassUnit
  readonly moistSoil: number
  readonly largestParticle?: number | undefined
  readonly lengthUnit: LengthUnit
  readonly moisture: MoistureSheet
}

/** Drive cylinder (D2937): weighings with and without the soil, and the volume stated or by inner diameter and height. */
export type DriveCylinderSheet = Calibrated & {
  readonly method: 'drive-cylinder'
  readonly massUnit: MassUnit
  readonly cylinderAndSoil: number
  readonly cylinder: number
  readonly volumeBy: 'stated' | 'measured'
  readonly volumeUnit: VolumeUnit
  readonly volume?: number | undefined
  readonly lengthUnit: LengthUnit
  readonly diameter?: number | undefined
  readonly height?: number | undefined
  readonly largestParticle?: number | undefined
  readonly moisture: MoistureSheet
}

/** The gauge's counts on its block this morning, and what they are compared with. */
export type StandardCounts = {
  readonly density: number
  readonly moisture: number
  /** Average of the last four days, or the calibration reference on the first four. */
  readonly referenceDensity?: number | undefined
  readonly referenceMoisture?: number | undefined
}

/** Nuclear gauge (D6938). A second reading, the gauge turned 90° or 180°, is averaged with the first. */
export type NuclearGaugeSheet = {
  readonly method: 'nuclear-gauge'
  /** The gauge of the register; its standard counts of the day stand there. */
  readonly gaugeId?: string | undefined
  readonly mode: 'direct-transmission' | 'backscatter'
  readonly lengthUnit: LengthUnit
  /** Depth of the source rod, in `lengthUnit`; 0 in backscatter. */
  readonly rodDepth: number
  readonly densityUnit: DensityUnit
  readonly wetDensity: number
  readonly secondWetDensity?: number | undefined
  /** Typed here only where the gauge is not in the register. */
  readonly standardCounts?: StandardCounts | undefined
  readonly moisture: MoistureSheet
}

/** Any other method the specification allows, or a report that states only density and moisture. */
export type PlainSheet = {
  readonly method: 'plain'
  readonly densityUnit: DensityUnit
  readonly densityIs: 'wet' | 'dry'
  readonly density: number
  readonly moisture: MoistureSheet
}

/** A field test as it was read, values in the units named beside them. */
export type RawSheet = SandConeSheet | RubberBalloonSheet | DriveCylinderSheet | NuclearGaugeSheet | PlainSheet
export type FieldMethod = RawSheet['method']

/** What a sheet comes to. Densities kg/m³, moisture percent of dry mass; all unrounded. */
export type ReducedSheet = {
  readonly ok: true
  readonly wetDensity: number
  readonly moisture: number
  readonly dryDensity: number
  readonly holeVolumeCm3?: number | undefined
  /** Outside an apparatus limit: saved, said, and the verdict stands. */
  readonly flags: readonly Reason[]
}

export type SheetReduction = ReducedSheet | { readonly ok: false; readonly problems: readonly FieldProblem[] }
