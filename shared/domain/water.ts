import { convertMass } from '#shared/units/mass.ts'

/** Pounds of water in a US gallon, as earthwork reckons (domain section 7; 8.33 to 8.35 are in use). */
export const POUNDS_PER_GALLON = 8.345

/** Fill to bring from one moisture to another. */
export interface WaterInput {
  /** compacted volume, cm³, 0 or more */
  readonly volumeCm3: number
  /** dry density it has or is placed at, kg/m³, above 0 */
  readonly dryDensityKgM3: number
  /** moisture now, % of dry mass, 0 or more */
  readonly moisturePercent: number
  /** moisture wanted, %; the optimum unless set */
  readonly targetPercent: number
}

/** Water to add, or, where negative, to lose; before losses on the way and on the ground. */
export interface WaterAmount {
  readonly kilograms: number
  readonly litres: number
  readonly usGallons: number
}

/**
 * Water to bring fill to its target: mass = V·γd·(w_t − w)/100. A litre is taken as a kilogram.
 * @param poundsPerGallon the weight of a gallon in use, default 8.345 lb
 */
export function waterToAdd(input: WaterInput, poundsPerGallon = POUNDS_PER_GALLON): WaterAmount {
  const cubicMetres = input.volumeCm3 / 1e6
  const kilograms = (cubicMetres * input.dryDensityKgM3 * (input.targetPercent - input.moisturePercent)) / 100
  return { kilograms, litres: kilograms, usGallons: convertMass(kilograms, 'kg', 'lb') / poundsPerGallon }
}

export interface WaterPlan {
  readonly cells: readonly (WaterAmount & { readonly cell: number })[]
  readonly total: WaterAmount
  /** tanker loads for the cells that need water, before losses; null without a tanker's size */
  readonly tankerLoads: number | null
}

/**
 * Water cell by cell and in all; a cell to dry is not set off against a cell to wet in the tanker's loads.
 * @param tankerLitres capacity of the tanker, litres, above 0
 */
export function planWater(
  cells: readonly (WaterInput & { readonly cell: number })[],
  options: { readonly tankerLitres?: number; readonly poundsPerGallon?: number } = {},
): WaterPlan {
  const amounts = cells.map((cell) => ({ cell: cell.cell, ...waterToAdd(cell, options.poundsPerGallon) }))
  const add = (key: keyof WaterAmount) => amounts.reduce((sum, amount) => sum + amount[key], 0)
  const toBring = amounts.reduce((sum, amount) => sum + Math.max(0, amount.litres), 0)
  return {
    cells: amounts,
    total: { kilograms: add('kilograms'), litres: add('litres'), usGallons: add('usGallons') },
    tankerLoads: options.tankerLitres === undefined ? null : Math.ceil(toBring / options.tankerLitres - 1e-9),
  }
}
