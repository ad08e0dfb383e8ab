import { cylinderVolumeCm3 } from '#shared/domain/drive-cylinder.ts'
import { readingProblems } from '#shared/domain/reading-problems.ts'
import type { Reading } from '#shared/domain/reading-problems.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'
import { convertLength } from '#shared/units/length.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import { convertMass } from '#shared/units/mass.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { VolumeUnit } from '#shared/units/volume.ts'

/** Bulk density of the test sand: a container of known volume filled, several times (D1556 annex). */
export type SandCalibration = {
  readonly kind: 'sand-density'
  readonly massUnit: MassUnit
  readonly volumeUnit: VolumeUnit
  readonly containerVolume: number
  readonly container: number
  /** container and sand, one a trial */
  readonly filled: readonly number[]
}

/** Sand that fills cone and plate: the apparatus weighed before and after it ran out on a flat face (D1556 annex). */
export type ConeCalibration = {
  readonly kind: 'cone'
  readonly massUnit: MassUnit
  readonly trials: readonly { readonly before: number; readonly after: number }[]
}

/** Volume of a cylinder by its inner diameters and heights (D2937), each measured several times. */
export type CylinderCalibration = {
  readonly kind: 'cylinder'
  readonly lengthUnit: LengthUnit
  readonly diameters: readonly number[]
  readonly heights: readonly number[]
}

/** The balloon's volume indicator against moulds or holes of known volume (D2167). */
export type BalloonCalibration = {
  readonly kind: 'balloon'
  readonly volumeUnit: VolumeUnit
  readonly trials: readonly { readonly known: number; readonly before: number; readonly after: number }[]
}

export type CalibrationSheet = SandCalibration | ConeCalibration | CylinderCalibration | BalloonCalibration
export type CalibrationKind = CalibrationSheet['kind']

/** In the order they are listed. */
export const CALIBRATION_KINDS: readonly CalibrationKind[] = ['sand-density', 'cone', 'cylinder', 'balloon']

/**
 * What a calibration comes to: sand density kg/m³, sand in the cone g, cylinder volume cm³, the indicator's mean error in
 * percent of the known volume (above zero: it reads too much).
 */
export type CalibrationResult =
  | {
      readonly ok: true
      readonly value: number
      /** the farthest trial from the mean, percent of it (balloon: the largest error); 0 for one trial */
      readonly spreadPercent: number
      readonly flags: readonly Reason[]
    }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] }

/** Trials are expected to agree with their mean, and an indicator with the known volume, this closely, percent (D1556, D2167; from memory). */
export const TRIAL_SPREAD_PERCENT = 1

/**
 * Works out a calibration from its measurements.
 * @param sheet one trial or more, in the units named beside
 * @returns the value with how far the trials spread, flagged above 1 %; or what is wrong with which field
 */
export function calibrate(sheet: CalibrationSheet): CalibrationResult {
  const problems = problemsOf(sheet)
  if (problems.length > 0) return { ok: false, problems }
  switch (sheet.kind) {
    case 'sand-density': {
      const volume = convertVolume(sheet.containerVolume, sheet.volumeUnit, 'm3')
      return ofTrials(sheet.filled.map((filled) => convertMass(filled - sheet.container, sheet.massUnit, 'kg') / volume))
    }
    case 'cone':
      return ofTrials(sheet.trials.map(({ before, after }) => convertMass(before - after, sheet.massUnit, 'g')))
    case 'cylinder':
      return ofCylinder(sheet)
    case 'balloon':
      return ofBalloon(sheet)
  }
}

const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length

function farthest(values: readonly number[]): number {
  const middle = mean(values)
  return Math.max(...values.map((value) => (100 * Math.abs(value - middle)) / middle))
}

function ofTrials(values: readonly number[]): CalibrationResult {
  const spreadPercent = farthest(values)
  return { ok: true, value: mean(values), spreadPercent, flags: [...spreadFlags(spreadPercent), ...fewFlags(values.length)] }
}

function spreadFlags(spreadPercent: number): Reason[] {
  if (settle(spreadPercent) <= TRIAL_SPREAD_PERCENT) return []
  return [{ code: 'trials-spread', message: `The trials lie up to ${spreadPercent.toFixed(1)} % from their mean; ${TRIAL_SPREAD_PERCENT} % is expected. Repeat the odd one.` }]
}

function fewFlags(trials: number): Reason[] {
  return trials >= 3 ? [] : [{ code: 'few-trials', message: 'Three trials or more are usual.' }]
}

function ofCylinder({ diameters, heights, lengthUnit }: CylinderCalibration): CalibrationResult {
  const mm = (lengths: readonly number[]) => lengths.map((length) => convertLength(length, lengthUnit, 'mm'))
  const [across, along] = [mm(diameters), mm(heights)]
  const spreadPercent = Math.max(farthest(across), farthest(along))
  return { ok: true, value: cylinderVolumeCm3(mean(across), mean(along)), spreadPercent, flags: spreadFlags(spreadPercent) }
}

function ofBalloon({ trials }: BalloonCalibration): CalibrationResult {
  const errors = trials.map(({ known, before, after }) => (100 * (after - before - known)) / known)
  const spreadPercent = Math.max(...errors.map(Math.abs))
  const off = settle(spreadPercent) > TRIAL_SPREAD_PERCENT
  const flag = { code: 'indicator-off', message: `The indicator is up to ${spreadPercent.toFixed(1)} % off a known volume; ${TRIAL_SPREAD_PERCENT} % is expected. Look for a leak, then calibrate again.` }
  return { ok: true, value: mean(errors), spreadPercent, flags: [...(off ? [flag] : []), ...fewFlags(trials.length)] }
}

function problemsOf(sheet: CalibrationSheet): FieldProblem[] {
  const problems = readingProblems(readingsOf(sheet))
  if (problems.length > 0) return problems
  const refuse = (field: string, code: string, message: string): FieldProblem => ({ field, code, message })
  switch (sheet.kind) {
    case 'sand-density':
      return sheet.filled.flatMap((filled, i) => (filled > sheet.container ? [] : [refuse(`filled.${i}`, 'no-sand', 'The filled container is no heavier than the empty one. Check which is which.')]))
    case 'cone':
      return sheet.trials.flatMap(({ before, after }, i) => (before > after ? [] : [refuse(`trials.${i}.after`, 'no-sand', 'After is as heavy as before. Check which is which.')]))
    case 'balloon':
      return sheet.trials.flatMap(({ before, after }, i) => (after > before ? [] : [refuse(`trials.${i}.after`, 'no-hole', 'The second reading is not above the first. Check which is which.')]))
    case 'cylinder':
      return []
  }
}

const each = (field: string, name: string, values: readonly number[]): Reading[] =>
  values.length === 0 ? [{ field: `${field}.0`, name, value: undefined }] : values.map((value, i) => ({ field: `${field}.${i}`, name, value }))

function readingsOf(sheet: CalibrationSheet): Reading[] {
  switch (sheet.kind) {
    case 'sand-density':
      return [
        { field: 'containerVolume', name: 'volume of the container', value: sheet.containerVolume },
        { field: 'container', name: 'mass of the empty container', value: sheet.container, mayBeZero: true },
        ...each('filled', 'mass of container and sand', sheet.filled),
      ]
    case 'cone':
      return [...each('trials', 'mass before', sheet.trials.map((trial) => trial.before)).map(at('before')), ...sheet.trials.map((trial, i) => ({ field: `trials.${i}.after`, name: 'mass after', value: trial.after, mayBeZero: true }))]
    case 'cylinder':
      return [...each('diameters', 'inner diameter', sheet.diameters), ...each('heights', 'height', sheet.heights)]
    case 'balloon':
      return [
        ...each('trials', 'known volume', sheet.trials.map((trial) => trial.known)).map(at('known')),
        ...sheet.trials.flatMap((trial, i) => [
          { field: `trials.${i}.before`, name: 'reading before', value: trial.before, mayBeZero: true },
          { field: `trials.${i}.after`, name: 'reading in the volume', value: trial.after },
        ]),
      ]
  }
}

const at = (name: string) => (reading: Reading): Reading => ({ ...reading, field: `${reading.field}.${name}` })
