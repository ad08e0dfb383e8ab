import fc from 'fast-check'
import type { MoistureSheet, RawSheet } from '#shared/domain/field-sheets.ts'

/** What no instrument shows, and what a slip of the finger makes of a reading. */
const HOSTILE = [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 0, -0, -1, 1e308, -1e308, Number.MAX_VALUE, 5e-324, 1e-12, 1e21, Number.MAX_SAFE_INTEGER]

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })
/** Mostly what well rolled fill of 2.1 g/cm³ at 13 % reads, else anything soil may. */
const mostly = (min: number, max: number, least: number, greatest: number) => fc.oneof({ weight: 3, arbitrary: between(min, max) }, { weight: 2, arbitrary: between(least, greatest) })

/** Units of mass, volume and density with what one of them is in grams, cm³ and kg/m³, written out apart from the product's own tables. */
export const GRAMS = { g: 1, kg: 1000, lb: 453.59237 } as const
export const CM3 = { cm3: 1, L: 1000, m3: 1e6, in3: 16.387064, ft3: 28_316.846592, yd3: 764_554.857984, gal: 3785.411784 } as const
export const KG_M3 = { 'kg/m3': 1, 'g/cm3': 1000, pcf: 16.018463373960142, 'kN/m3': 1000 / 9.80665, 'lb/yd3': 0.5932764212577829 } as const
export const MM = { mm: 1, cm: 10, m: 1000, in: 25.4, ft: 304.8, 'us-ft': 1_200_000 / 3937 } as const

const unitOf = <T extends object>(table: T) => fc.constantFrom(...(Object.keys(table) as (keyof T)[]))

/** Moist soil as it lies: hole in cm³, wet density in g/cm³. */
const soil = fc.record({ volume: between(700, 3200), density: mostly(2.03, 2.2, 1.3, 2.5) })

const tin = fc
  .record({ method: fc.constantFrom('oven' as const, 'microwave' as const), massUnit: unitOf(GRAMS), tin: between(20, 120), dry: between(80, 600), w: mostly(10.5, 15.5, 0, 45), steps: fc.array(between(0, 1), { maxLength: 3 }) })
  .map(({ method, massUnit, tin: empty, dry, w, steps }): MoistureSheet => {
    const of = (grams: number) => grams / GRAMS[massUnit]
    const wet = dry * (1 + w / 100)
    const masses = [...steps].sort((a, b) => b - a).map((share) => of(empty + dry + share * (wet - dry)))
    return { method, massUnit, wetAndTin: of(empty + wet), dryAndTin: of(empty + dry), tin: of(empty), ...(masses.length === 0 ? {} : { earlier: masses }) }
  })

const moisture: fc.Arbitrary<MoistureSheet> = fc.oneof(
  tin,
  fc.record({ method: fc.constant('carbide' as const), readingPercent: mostly(9.5, 13.5, 0, 40) }),
  fc.record({ method: fc.constant('stated' as const), percent: mostly(10.5, 15.5, 0, 45) }),
  fc
    .record({ densityUnit: unitOf(KG_M3), water: mostly(200, 280, 0, 400), correctionK: mostly(-5, 5, -30, 30), wall: fc.option(fc.record({ convention: fc.constantFrom('block-minus-standard' as const, 'standard-minus-block' as const), appliedBy: fc.constantFrom('gauge' as const, 'here' as const), offset: between(-1, 1) }), { nil: undefined }) })
    .map(({ densityUnit, water, correctionK, wall }): MoistureSheet => ({ method: 'gauge', densityUnit, moistureDensity: water / KG_M3[densityUnit], correctionK, ...(wall ? { wall } : {}) })),
)

const particle = fc.option(fc.record({ largestParticle: between(0, 60), lengthUnit: unitOf(MM) }), { nil: undefined })

const sandCone = fc.record({ soil, moisture, massUnit: unitOf(GRAMS), densityUnit: unitOf(KG_M3), sand: between(1.2, 1.8), cone: between(900, 1900), left: between(100, 4000), particle }).map((made): RawSheet => {
  const mass = (grams: number) => grams / GRAMS[made.massUnit]
  return {
    method: 'sand-cone',
    massUnit: made.massUnit,
    apparatusBefore: mass(made.left + made.cone + made.soil.volume * made.sand),
    apparatusAfter: mass(made.left),
    coneAndPlate: mass(made.cone),
    densityUnit: made.densityUnit,
    sandDensity: (1000 * made.sand) / KG_M3[made.densityUnit],
    moistSoil: mass(made.soil.volume * made.soil.density),
    ...made.particle,
    moisture: made.moisture,
  }
})

const balloon = fc.record({ soil, moisture, massUnit: unitOf(GRAMS), volumeUnit: unitOf(CM3), lengthUnit: unitOf(MM), before: between(0, 900), particle }).map((made): RawSheet => {
  const { particle: seen, soil: dug, massUnit, volumeUnit } = made
  return {
    method: 'rubber-balloon',
    massUnit,
    volumeUnit,
    volumeBefore: made.before / CM3[volumeUnit],
    volumeAfter: (made.before + dug.volume) / CM3[volumeUnit],
    moistSoil: (dug.volume * dug.density) / GRAMS[massUnit],
    lengthUnit: seen?.lengthUnit ?? made.lengthUnit,
    ...(seen ? { largestParticle: seen.largestParticle } : {}),
    moisture: made.moisture,
  }
})

const cylinder = fc.record({ soil, moisture, massUnit: unitOf(GRAMS), volumeUnit: unitOf(CM3), lengthUnit: unitOf(MM), empty: between(300, 1200), diameter: between(70, 160), stated: fc.boolean(), largestParticle: fc.option(between(0, 10), { nil: undefined }) }).map((made): RawSheet => {
  const { massUnit, volumeUnit, lengthUnit, soil: taken } = made
  const height = (4000 * taken.volume) / (Math.PI * made.diameter ** 2)
  const size = made.stated ? { volume: taken.volume / CM3[volumeUnit] } : { diameter: made.diameter / MM[lengthUnit], height: height / MM[lengthUnit] }
  return {
    method: 'drive-cylinder',
    massUnit,
    volumeUnit,
    lengthUnit,
    volumeBy: made.stated ? 'stated' : 'measured',
    cylinderAndSoil: (made.empty + taken.volume * taken.density) / GRAMS[massUnit],
    cylinder: made.empty / GRAMS[massUnit],
    ...size,
    ...(made.largestParticle === undefined ? {} : { largestParticle: made.largestParticle }),
    moisture: made.moisture,
  }
})

const gauge = fc.record({ soil, moisture, densityUnit: unitOf(KG_M3), lengthUnit: unitOf(MM), rod: between(50, 300), backscatter: fc.boolean(), turned: fc.option(between(-0.02, 0.02), { nil: undefined }), counts: fc.option(fc.record({ density: between(1500, 3500), moisture: between(300, 900), referenceDensity: between(1500, 3500), referenceMoisture: between(300, 900) }), { nil: undefined }) }).map((made): RawSheet => {
  const wetDensity = (1000 * made.soil.density) / KG_M3[made.densityUnit]
  return {
    method: 'nuclear-gauge',
    mode: made.backscatter ? 'backscatter' : 'direct-transmission',
    lengthUnit: made.lengthUnit,
    rodDepth: made.backscatter ? 0 : made.rod / MM[made.lengthUnit],
    densityUnit: made.densityUnit,
    wetDensity,
    ...(made.turned === undefined ? {} : { secondWetDensity: wetDensity * (1 + made.turned) }),
    ...(made.counts === undefined ? {} : { standardCounts: made.counts }),
    moisture: made.moisture,
  }
})

const plain = fc.record({ soil, moisture, densityUnit: unitOf(KG_M3), densityIs: fc.constantFrom('wet' as const, 'dry' as const) }).map((made): RawSheet => ({
  method: 'plain',
  densityUnit: made.densityUnit,
  densityIs: made.densityIs,
  density: (1000 * made.soil.density) / KG_M3[made.densityUnit],
  moisture: made.moisture,
}))

/** A sheet as a careful technician fills it in, of any field and moisture method, in any units. */
export const likelySheet: fc.Arbitrary<RawSheet> = fc.oneof(sandCone, balloon, cylinder, gauge, plain)

/** Paths of the sheet's numbers: "moistSoil", "moisture.earlier.0". */
export function numbersOf(value: object, path = ''): string[] {
  return Object.entries(value).flatMap(([name, inner]: [string, unknown]) => {
    const at = path === '' ? name : `${path}.${name}`
    if (typeof inner === 'number') return [at]
    return typeof inner === 'object' && inner !== null ? numbersOf(inner, at) : []
  })
}

export function numberAt(sheet: object, path: string): number {
  const found = path.split('.').reduce<unknown>((value, step) => (value as Record<string, unknown>)[step], sheet)
  if (typeof found !== 'number') throw new Error(`No number at ${path}`)
  return found
}

function withNumber<T extends object>(sheet: T, path: string, value: number | undefined): T {
  const copy = structuredClone(sheet)
  const steps = path.split('.')
  const last = steps.pop() ?? ''
  const holder = steps.reduce<unknown>((inner, step) => (inner as Record<string, unknown>)[step], copy) as Record<string, unknown>
  if (value === undefined && !Array.isArray(holder)) delete holder[last]
  else holder[last] = value ?? Number.NaN
  return copy
}

const OPTIONAL = /(largestParticle|volume|diameter|height|secondWetDensity|reference(Density|Moisture))$/

type Slip = { readonly kind: 'value'; readonly value: number } | { readonly kind: 'factor'; readonly factor: number } | { readonly kind: 'swap' | 'leave-out' }

const slip: fc.Arbitrary<Slip> = fc.oneof(
  fc.constantFrom(...HOSTILE).map((value) => ({ kind: 'value' as const, value })),
  fc.double().map((value) => ({ kind: 'value' as const, value })),
  // pounds for kilograms, feet for inches, a point in the wrong place
  fc.constantFrom(-1, 0.001, 0.1, 1 / 2.20462, 2.20462, 12, 16.018, 62.43, 1000, 453.59237).map((factor) => ({ kind: 'factor' as const, factor })),
  fc.constant({ kind: 'swap' as const }),
  fc.constant({ kind: 'leave-out' as const }),
)

function slipped(sheet: RawSheet, made: Slip, first: number, second: number): RawSheet {
  const paths = numbersOf(sheet)
  const path = paths[first % paths.length] ?? ''
  switch (made.kind) {
    case 'value':
      return withNumber(sheet, path, made.value)
    case 'factor':
      return withNumber(sheet, path, numberAt(sheet, path) * made.factor)
    case 'leave-out':
      return OPTIONAL.test(path) ? withNumber(sheet, path, undefined) : withNumber(sheet, path, Number.NaN)
    case 'swap': {
      const other = paths[second % paths.length] ?? ''
      return withNumber(withNumber(sheet, path, numberAt(sheet, other)), other, numberAt(sheet, path))
    }
  }
}

/** A likely sheet with up to three slips in it: readings swapped, in another unit, left out, or what no instrument shows. */
export const hostileSheet: fc.Arbitrary<RawSheet> = fc
  .tuple(likelySheet, fc.array(fc.tuple(slip, fc.nat(60), fc.nat(60)), { maxLength: 3 }))
  .map(([sheet, slips]) => slips.reduce((last, [made, first, second]) => slipped(last, made, first, second), sheet))
