/** What a soil's solids may be of, with the specific gravities found for it. */
export interface TypicalGravity {
  readonly name: string
  readonly low: number
  /** equal to `low` where one value is given */
  readonly high: number
}

export interface GravityTable {
  readonly title: string
  readonly source: string
  readonly rows: readonly TypicalGravity[]
}

const of = (name: string, low: number, high = low): TypicalGravity => ({ name, low, high })

/** Specific gravity of solids by soil (Army FM 5-472, specific gravity test). */
const SOILS: GravityTable = {
  title: 'Soils',
  source: 'Army FM 5-472',
  rows: [of('Inorganic soil', 2.6, 2.8), of('Quartz sand', 2.65, 2.67), of('Iron-rich laterite', 2.75, 3)],
}

/** Specific gravity of the minerals that soils are made of (table at civilengineering.blog, 2020-02-14; quartz: scholars.direct jpe-4-012, table 2). */
const MINERALS: GravityTable = {
  title: 'Minerals',
  source: 'published tables of minerals',
  rows: [
    of('Quartz', 2.65),
    of('Kaolinite', 2.64),
    of('Illite', 2.6, 2.86),
    of('Montmorillonite', 2.75, 2.78),
    of('Halloysite', 2.55),
    of('Chlorite', 2.6, 2.9),
    of('Attapulgite', 2.3),
    of('Muscovite', 2.7, 3.1),
    of('Biotite', 3, 3.1),
    of('Potassium feldspar', 2.54, 2.587),
    of('Sodium and calcium feldspar', 2.62, 2.76),
    of('Calcite', 2.72),
    of('Dolomite', 2.85),
    of('Gypsum', 2.32),
    of('Aragonite', 2.94),
    of('Hornblende', 3.2, 3.5),
    of('Augite', 3.2, 3.4),
    of('Limonite', 3.8),
    of('Magnetite', 5.17),
    of('Hematite', 5.2),
  ],
}

/**
 * Typical specific gravities of solids, to check a value against or to assume one knowingly; never a default.
 */
export const TYPICAL_GRAVITIES: readonly GravityTable[] = [SOILS, MINERALS]

/**
 * What a specific gravity is unusual for.
 * @param gs specific gravity of the solids
 * @returns a sentence where it lies outside what inorganic soils have (FM 5-472), else null
 */
export function unusualGravity(gs: number): string | null {
  const [inorganic] = SOILS.rows
  if (inorganic === undefined || !Number.isFinite(gs) || (gs >= inorganic.low && gs <= inorganic.high)) return null
  return `Most inorganic soils have ${inorganic.low.toFixed(2)} to ${inorganic.high.toFixed(2)}. Check it, or say measured.`
}
