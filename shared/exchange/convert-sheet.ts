import type { MoistureSheet, RawSheet } from '#shared/domain/field-sheets.ts'
import { convertDensity, type DensityUnit } from '#shared/units/density.ts'
import type { UnitSystem } from '#shared/units/format.ts'
import { convertLength, type LengthUnit } from '#shared/units/length.ts'
import { convertMass, type MassUnit } from '#shared/units/mass.ts'
import { convertVolume, type VolumeUnit } from '#shared/units/volume.ts'

const TO = {
  us: { mass: 'lb', density: 'pcf', volume: 'ft3', length: 'in', tin: 'g' },
  si: { mass: 'g', density: 'kg/m3', volume: 'cm3', length: 'mm', tin: 'g' },
} as const satisfies Record<UnitSystem, { mass: MassUnit; density: DensityUnit; volume: VolumeUnit; length: LengthUnit; tin: MassUnit }>

/** Digits a converted reading is given with: more than any instrument shows. */
const DIGITS = 7
const short = (value: number): number => Number(value.toPrecision(DIGITS))
/** A reading that stands in the unit already is left to the last digit. */
const changed = <U>(value: number, from: U, to: U, convert: (value: number, from: U, to: U) => number): number => (from === to ? value : short(convert(value, from, to)))

const optional = <K extends string>(name: K, value: number | undefined, convert: (value: number) => number): Partial<Record<K, number>> => (value === undefined ? {} : ({ [name]: convert(value) } as Partial<Record<K, number>>))

/**
 * A field sheet with every reading in one system's units, for reading and for comparing; what is converted, to seven digits.
 * @param sheet in any units
 */
export function convertSheet(sheet: RawSheet, system: UnitSystem): RawSheet {
  const to = TO[system]
  const { mass, density, volume, length } = to
  const moisture = convertMoisture(sheet.moisture, system)
  switch (sheet.method) {
    case 'sand-cone': {
      const m = (value: number) => changed(value, sheet.massUnit, mass, convertMass)
      const { lengthUnit } = sheet
      return {
        ...sheet,
        massUnit: mass,
        apparatusBefore: m(sheet.apparatusBefore),
        apparatusAfter: m(sheet.apparatusAfter),
        coneAndPlate: m(sheet.coneAndPlate),
        moistSoil: m(sheet.moistSoil),
        densityUnit: density,
        sandDensity: changed(sheet.sandDensity, sheet.densityUnit, density, convertDensity),
        ...(lengthUnit === undefined ? {} : { lengthUnit: length, ...optional('largestParticle', sheet.largestParticle, (own) => changed(own, lengthUnit, length, convertLength)) }),
        moisture,
      }
    }
    case 'rubber-balloon': {
      const v = (value: number) => changed(value, sheet.volumeUnit, volume, convertVolume)
      return {
        ...sheet,
        volumeUnit: volume,
        volumeBefore: v(sheet.volumeBefore),
        volumeAfter: v(sheet.volumeAfter),
        massUnit: mass,
        moistSoil: changed(sheet.moistSoil, sheet.massUnit, mass, convertMass),
        lengthUnit: length,
        ...optional('largestParticle', sheet.largestParticle, (own) => changed(own, sheet.lengthUnit, length, convertLength)),
        moisture,
      }
    }
    case 'drive-cylinder': {
      const m = (value: number) => changed(value, sheet.massUnit, mass, convertMass)
      const l = (own: number) => changed(own, sheet.lengthUnit, length, convertLength)
      return {
        ...sheet,
        massUnit: mass,
        cylinderAndSoil: m(sheet.cylinderAndSoil),
        cylinder: m(sheet.cylinder),
        volumeUnit: volume,
        ...optional('volume', sheet.volume, (own) => changed(own, sheet.volumeUnit, volume, convertVolume)),
        lengthUnit: length,
        ...optional('diameter', sheet.diameter, l),
        ...optional('height', sheet.height, l),
        ...optional('largestParticle', sheet.largestParticle, l),
        moisture,
      }
    }
    case 'nuclear-gauge': {
      const d = (own: number) => changed(own, sheet.densityUnit, density, convertDensity)
      return {
        ...sheet,
        lengthUnit: length,
        rodDepth: changed(sheet.rodDepth, sheet.lengthUnit, length, convertLength),
        densityUnit: density,
        wetDensity: d(sheet.wetDensity),
        ...optional('secondWetDensity', sheet.secondWetDensity, d),
        moisture,
      }
    }
    case 'plain':
      return { ...sheet, densityUnit: density, density: changed(sheet.density, sheet.densityUnit, density, convertDensity), moisture }
  }
}

function convertMoisture(sheet: MoistureSheet, system: UnitSystem): MoistureSheet {
  const { density, tin } = TO[system]
  if (sheet.method === 'oven' || sheet.method === 'microwave') {
    const m = (value: number) => changed(value, sheet.massUnit, tin, convertMass)
    return { ...sheet, massUnit: tin, wetAndTin: m(sheet.wetAndTin), dryAndTin: m(sheet.dryAndTin), tin: m(sheet.tin), ...(sheet.earlier === undefined ? {} : { earlier: sheet.earlier.map(m) }) }
  }
  if (sheet.method !== 'gauge') return sheet
  const d = (value: number) => changed(value, sheet.densityUnit, density, convertDensity)
  return { ...sheet, densityUnit: density, moistureDensity: d(sheet.moistureDensity), ...(sheet.wall === undefined ? {} : { wall: { ...sheet.wall, offset: d(sheet.wall.offset) } }) }
}
