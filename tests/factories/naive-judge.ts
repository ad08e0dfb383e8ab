import type { MoistureSheet, RawSheet } from '#shared/domain/field-sheets.ts'
import { CM3, GRAMS, KG_M3, MM } from './hostile-sheet.ts'

/** kg/m³ and percent by the definitions alone, written again apart from the product: nothing is checked, nothing refused. */
export function naiveReduction(sheet: RawSheet): { readonly wet: number; readonly w: number; readonly dry: number } {
  if (sheet.method === 'plain' && sheet.densityIs === 'dry') {
    const dry = sheet.density * KG_M3[sheet.densityUnit]
    const water = sheet.moisture.method === 'gauge' ? waterOf(sheet.moisture) : 0
    const w = naiveMoisture(sheet.moisture, dry + water)
    return { wet: dry * (1 + w / 100), w, dry }
  }
  const wet = naiveWet(sheet)
  const w = naiveMoisture(sheet.moisture, wet)
  return { wet, w, dry: wet / (1 + w / 100) }
}

function naiveWet(sheet: RawSheet): number {
  switch (sheet.method) {
    case 'sand-cone': {
      // kg over litres of sand at its density
      const sand = (sheet.apparatusBefore - sheet.apparatusAfter - sheet.coneAndPlate) * GRAMS[sheet.massUnit]
      const litres = sand / (sheet.sandDensity * KG_M3[sheet.densityUnit])
      return (1000 * sheet.moistSoil * GRAMS[sheet.massUnit]) / (1000 * litres)
    }
    case 'rubber-balloon':
      return (1000 * sheet.moistSoil * GRAMS[sheet.massUnit]) / ((sheet.volumeAfter - sheet.volumeBefore) * CM3[sheet.volumeUnit])
    case 'drive-cylinder': {
      // sheets are made in these units alone
      const mm = MM[sheet.lengthUnit as keyof typeof MM]
      const [d, h] = [(sheet.diameter ?? 0) * mm, (sheet.height ?? 0) * mm]
      const cm3 = sheet.volumeBy === 'stated' ? (sheet.volume ?? 0) * CM3[sheet.volumeUnit] : (Math.PI / 4) * (d / 10) ** 2 * (h / 10)
      return (1000 * (sheet.cylinderAndSoil - sheet.cylinder) * GRAMS[sheet.massUnit]) / cm3
    }
    case 'nuclear-gauge':
      return (sheet.secondWetDensity === undefined ? sheet.wetDensity : (sheet.wetDensity + sheet.secondWetDensity) / 2) * KG_M3[sheet.densityUnit]
    case 'plain':
      return sheet.density * KG_M3[sheet.densityUnit]
  }
}

function waterOf({ wall, moistureDensity, densityUnit }: Extract<MoistureSheet, { method: 'gauge' }>): number {
  const offset = wall === undefined || wall.appliedBy === 'gauge' ? 0 : wall.convention === 'block-minus-standard' ? -wall.offset : wall.offset
  return (moistureDensity + offset) * KG_M3[densityUnit]
}

function naiveMoisture(sheet: MoistureSheet, wet: number): number {
  switch (sheet.method) {
    case 'oven':
    case 'microwave':
      return (100 * (sheet.wetAndTin - sheet.dryAndTin)) / (sheet.dryAndTin - sheet.tin)
    case 'carbide':
      return 100 / (100 / sheet.readingPercent - 1)
    case 'stated':
      return sheet.percent
    case 'gauge': {
      const read = (100 * waterOf(sheet)) / (wet - waterOf(sheet))
      return read + (sheet.correctionK / 1000) * (100 + read)
    }
  }
}

/** What the naive judge compares by: the pair in kg/m³ and percent, every limit a plain number, compared unrounded. */
export interface NaiveLimits {
  readonly max: number
  readonly optimum: number
  readonly gs: number
  readonly rcMin: number
  readonly rcMax: number
  readonly drier: number
  readonly wetter: number
  readonly saturationMax: number
  readonly airVoidsMax: number
}

/**
 * Pass, fail or suspect by the words of the domain's section 3, with measured Gs; and how near the nearest limit is, relative,
 * so that a test may leave out what only the last digit decides.
 */
export function naiveOutcome({ w, dry }: { readonly w: number; readonly dry: number }, limits: NaiveLimits): { readonly outcome: 'pass' | 'fail' | 'suspect'; readonly margin: number } {
  const rc = (100 * dry) / limits.max
  const off = w - limits.optimum
  // volumes of one cubic metre: solids, water, and what is left
  const solids = dry / (limits.gs * 1000)
  const water = ((w / 100) * dry) / 1000
  const voids = 1 - solids
  const saturated = voids > 1e-9 ? (100 * water) / voids : Number.POSITIVE_INFINITY
  const air = 100 * (voids - water)
  const suspect = saturated > 100 || rc > 120
  const fails = rc < limits.rcMin || rc > limits.rcMax || off < -limits.drier || off > limits.wetter || saturated > limits.saturationMax || air > limits.airVoidsMax
  const margin = Math.min(
    ...[rc - 120, rc - limits.rcMin, rc - limits.rcMax, off + limits.drier, off - limits.wetter, saturated - 100, saturated - limits.saturationMax, air - limits.airVoidsMax].map(Math.abs),
  )
  return { outcome: suspect ? 'suspect' : fails ? 'fail' : 'pass', margin }
}
