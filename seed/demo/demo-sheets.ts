import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { Chance } from '#seed/demo/demo-random.ts'

export interface Reading {
  /** pcf */
  readonly dry: number
  /** % of dry mass */
  readonly moisture: number
}

const round = (value: number, decimals: number): number => Number(value.toFixed(decimals))

/** What a gauge of the register shows over ground of this density and moisture. */
export function gaugeSheet({ dry, moisture }: Reading, gaugeId: string): CreateTest['sheet'] {
  return {
    method: 'nuclear-gauge',
    gaugeId,
    mode: 'direct-transmission',
    lengthUnit: 'in',
    rodDepth: 6,
    densityUnit: 'pcf',
    wetDensity: round(dry * (1 + moisture / 100), 1),
    moisture: { method: 'gauge', densityUnit: 'pcf', moistureDensity: round((dry * moisture) / 100, 1), correctionK: 0 },
  }
}

const TIN = 78.4
/** pcf of one g/cm³ */
const PCF = 62.428

const wetOf = ({ dry, moisture }: Reading): number => (dry * (1 + moisture / 100)) / PCF

/** What a sand cone and a microwave give for it, dried to constant mass in three steps. */
export function sandConeSheet(reading: Reading, chance: Chance, calibrationIds: string[] = []): CreateTest['sheet'] {
  const hole = chance.uniform(1_950, 2_350)
  const wetSoil = chance.uniform(300, 340)
  const dryAndTin = round(wetSoil / (1 + reading.moisture / 100) + TIN, 1)
  return {
    method: 'sand-cone',
    massUnit: 'g',
    apparatusBefore: 7_612,
    apparatusAfter: round(7_612 - 1_548 - hole * 1.418, 0),
    coneAndPlate: 1_548,
    densityUnit: 'g/cm3',
    sandDensity: 1.418,
    moistSoil: round(wetOf(reading) * hole, 0),
    largestParticle: 0.5,
    lengthUnit: 'in',
    ...(calibrationIds.length === 0 ? {} : { calibrationIds }),
    moisture: { method: 'microwave', massUnit: 'g', wetAndTin: round(wetSoil + TIN, 1), dryAndTin, tin: TIN, earlier: [round(dryAndTin + 4.6, 1), round(dryAndTin + 0.2, 1)] },
  }
}

/** What a rubber balloon and a carbide tester give for it. */
export function balloonSheet(reading: Reading, chance: Chance, calibrationIds: string[]): CreateTest['sheet'] {
  const hole = chance.uniform(1_600, 2_100)
  const before = round(chance.uniform(205, 220), 0)
  const after = round(before + hole, 0)
  return {
    method: 'rubber-balloon',
    volumeUnit: 'cm3',
    volumeBefore: before,
    volumeAfter: after,
    massUnit: 'g',
    moistSoil: round(wetOf(reading) * (after - before), 0),
    largestParticle: 0.5,
    lengthUnit: 'in',
    calibrationIds,
    moisture: { method: 'carbide', readingPercent: round((100 * reading.moisture) / (100 + reading.moisture), 1) },
  }
}

/** What a drive cylinder of 943.96 cm³ and an oven give for it. */
export function cylinderSheet(reading: Reading, chance: Chance, calibrationIds: string[]): CreateTest['sheet'] {
  const volume = 943.96
  const cylinder = round(chance.uniform(2_055, 2_065), 0)
  const wetSoil = chance.uniform(220, 260)
  return {
    method: 'drive-cylinder',
    massUnit: 'g',
    cylinderAndSoil: round(cylinder + wetOf(reading) * volume, 0),
    cylinder,
    volumeBy: 'stated',
    volumeUnit: 'cm3',
    volume,
    lengthUnit: 'in',
    calibrationIds,
    moisture: { method: 'oven', massUnit: 'g', wetAndTin: round(wetSoil + TIN, 1), dryAndTin: round(wetSoil / (1 + reading.moisture / 100) + TIN, 1), tin: TIN },
  }
}
