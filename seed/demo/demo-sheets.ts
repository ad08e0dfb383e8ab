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

/** What a sand cone and a microwave give for it. */
export function sandConeSheet({ dry, moisture }: Reading, chance: Chance): CreateTest['sheet'] {
  const hole = chance.uniform(1_950, 2_350)
  const wetGcm3 = (dry * (1 + moisture / 100)) / 62.428
  const wetSoil = chance.uniform(300, 340)
  const tin = 78.4
  return {
    method: 'sand-cone',
    massUnit: 'g',
    apparatusBefore: 7_612,
    apparatusAfter: round(7_612 - 1_548 - hole * 1.418, 0),
    coneAndPlate: 1_548,
    densityUnit: 'g/cm3',
    sandDensity: 1.418,
    moistSoil: round(wetGcm3 * hole, 0),
    largestParticle: 0.5,
    lengthUnit: 'in',
    moisture: { method: 'microwave', massUnit: 'g', wetAndTin: round(wetSoil + tin, 1), dryAndTin: round(wetSoil / (1 + moisture / 100) + tin, 1), tin },
  }
}
