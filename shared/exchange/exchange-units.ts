import type { DensityUnit } from '#shared/units/density.ts'
import type { UnitSystem } from '#shared/units/format.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import type { VolumeUnit } from '#shared/units/volume.ts'

/** Readings of one sheet that share one unit; a tin and the water of a gauge have their own. */
export const UNIT_GROUPS = ['mass', 'density', 'volume', 'length', 'tin', 'water', 'plan', 'elevation', 'depth'] as const
export type UnitGroup = (typeof UNIT_GROUPS)[number]

export type ExchangeUnit = MassUnit | DensityUnit | VolumeUnit | LengthUnit

const MASSES = ['g', 'kg', 'lb'] as const
const DENSITIES = ['pcf', 'kg/m3', 'g/cm3', 'kN/m3', 'lb/yd3'] as const
const LENGTHS = ['in', 'mm', 'cm', 'm', 'ft', 'us-ft'] as const

/** The units each group may be read in. */
export const GROUP_UNITS: Readonly<Record<UnitGroup, readonly ExchangeUnit[]>> = {
  mass: MASSES,
  density: DENSITIES,
  volume: ['cm3', 'L', 'm3', 'in3', 'ft3', 'yd3', 'gal'],
  length: LENGTHS,
  tin: MASSES,
  water: DENSITIES,
  plan: ['m', 'ft', 'us-ft'],
  elevation: LENGTHS,
  depth: LENGTHS,
}

/** What a group is called where its unit is chosen for a file. */
export const GROUP_WORDS: Readonly<Record<UnitGroup, string>> = {
  mass: 'Masses of apparatus and soil',
  density: 'Densities',
  volume: 'Volumes',
  length: 'Lengths on the sheet',
  tin: 'Masses of the tin',
  water: 'Moisture density of the gauge',
  plan: 'Easting and northing',
  elevation: 'Surface elevation',
  depth: 'Depth',
}

export type GroupUnits = Readonly<Record<UnitGroup, ExchangeUnit>>

/** What a sheet of each system is usually read in; tins are weighed in grams everywhere. */
export function usualUnits(system: UnitSystem, planUnit: LengthUnit): GroupUnits {
  return system === 'us'
    ? { mass: 'lb', density: 'pcf', volume: 'ft3', length: 'in', tin: 'g', water: 'pcf', plan: planUnit, elevation: 'ft', depth: 'in' }
    : { mass: 'g', density: 'kg/m3', volume: 'cm3', length: 'mm', tin: 'g', water: 'kg/m3', plan: planUnit, elevation: 'm', depth: 'mm' }
}

/** Other ways in which laboratories write the units, all small, without blanks. */
const SPELLINGS: Readonly<Record<string, ExchangeUnit>> = {
  gram: 'g', grams: 'g', gm: 'g', kilogram: 'kg', kilograms: 'kg', kgs: 'kg', lbs: 'lb', pound: 'lb', pounds: 'lb',
  'lb/ft3': 'pcf', 'lbs/ft3': 'pcf', 'lb/cuft': 'pcf', 'lbf/ft3': 'pcf', 'g/cc': 'g/cm3', 'g/ml': 'g/cm3', 'mg/m3': 'g/cm3', 't/m3': 'g/cm3', 'kg/cum': 'kg/m3', 'kn/m3': 'kN/m3', 'lb/cuyd': 'lb/yd3',
  cc: 'cm3', ml: 'cm3', l: 'L', litre: 'L', liter: 'L', cuft: 'ft3', 'cu.ft': 'ft3', cuin: 'in3', 'cu.in': 'in3', cuyd: 'yd3', cy: 'yd3', gallon: 'gal', gallons: 'gal',
  inch: 'in', inches: 'in', '"': 'in', feet: 'ft', foot: 'ft', "'": 'ft', 'intlft': 'ft', usft: 'us-ft', 'ussurveyft': 'us-ft', 'ussurveyfoot': 'us-ft', 'ussurveyfeet': 'us-ft', metre: 'm', meter: 'm', metres: 'm', meters: 'm',
}

/** The unit a word means within a group, or undefined: "lb/ft³" is pcf, "cc" is cm3. */
export function readUnit(text: string, group: UnitGroup): ExchangeUnit | undefined {
  const plain = text.trim().toLowerCase().replaceAll('²', '2').replaceAll('³', '3').replaceAll('^', '').replace(/\s/g, '')
  const found = GROUP_UNITS[group].find((unit) => unit.toLowerCase() === plain) ?? SPELLINGS[plain]
  return found !== undefined && GROUP_UNITS[group].includes(found) ? found : undefined
}
