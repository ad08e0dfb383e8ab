import { GREATEST_DENSITY, LEAST_DENSITY } from '#shared/domain/curve-checks.ts'
import { dryingFlags, dryingProblems } from '#shared/domain/constant-mass.ts'
import { reduceDriveCylinder } from '#shared/domain/drive-cylinder.ts'
import type { MoistureSheet, PlainSheet, RawSheet, SheetReduction } from '#shared/domain/field-sheets.ts'
import { moistureFromCarbide, moistureFromGauge, moistureFromTin, tinProblems } from '#shared/domain/moisture.ts'
import { reduceNuclearGauge } from '#shared/domain/nuclear-gauge.ts'
import { dryDensityOf, wetDensityOf } from '#shared/domain/phase-relations.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { reduceRubberBalloon } from '#shared/domain/rubber-balloon.ts'
import { reduceSandCone } from '#shared/domain/sand-cone.ts'
import { moistureBesideWall, wallOffsetFlags } from '#shared/domain/wall-offset.ts'
import { convertDensity } from '#shared/units/density.ts'
import type { DensityUnit } from '#shared/units/density.ts'
import { formatQuantity } from '#shared/units/format.ts'

type Density =
  | { readonly ok: true; readonly wetDensity: number; readonly holeVolumeCm3?: number; readonly flags: readonly Reason[] }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] }

const MOST_MOISTURE = 500

/**
 * Reduces a field sheet, of any method, to wet density, moisture and dry density. Impossible arithmetic is refused with
 * the field named; a result outside an apparatus limit is flagged and stands.
 * @param sheet values in the units named beside them
 * @returns kg/m³ and percent, unrounded
 */
export function reduceSheet(sheet: RawSheet): SheetReduction {
  if (sheet.method === 'plain' && sheet.densityIs === 'dry') return reduceDryEntry(sheet)
  const density = wetDensityOfSheet(sheet)
  const moisture = reduceMoisture(sheet.moisture, density.ok ? density.wetDensity : null)
  if (!density.ok || !moisture.ok) {
    return { ok: false, problems: [...(density.ok ? [] : density.problems), ...(moisture.ok ? [] : moisture.problems)] }
  }
  const { wetDensity, holeVolumeCm3 } = density
  const dryDensity = dryDensityOf(wetDensity, moisture.percent)
  const absurd = absurdDensity(sheet, wetDensity)
  if (absurd) return { ok: false, problems: [absurd] }
  return {
    ok: true,
    wetDensity,
    moisture: moisture.percent,
    dryDensity,
    ...(holeVolumeCm3 === undefined ? {} : { holeVolumeCm3 }),
    flags: [...density.flags, ...moisture.flags],
  }
}

/**
 * A plain sheet for what a report states: dry unit weight and moisture.
 * @param dryDensity in `densityUnit`
 * @param moisturePercent of dry mass
 */
export function dryAndMoisture(dryDensity: number, densityUnit: DensityUnit, moisturePercent: number): PlainSheet {
  return {
    method: 'plain',
    densityUnit,
    densityIs: 'dry',
    density: dryDensity,
    moisture: { method: 'stated', percent: moisturePercent },
  }
}

function wetDensityOfSheet(sheet: RawSheet): Density {
  switch (sheet.method) {
    case 'sand-cone':
      return reduceSandCone(sheet)
    case 'rubber-balloon':
      return reduceRubberBalloon(sheet)
    case 'drive-cylinder':
      return reduceDriveCylinder(sheet)
    case 'nuclear-gauge':
      return reduceNuclearGauge(sheet)
    case 'plain': {
      const problem = plainDensityProblem(sheet)
      if (problem) return { ok: false, problems: [problem] }
      return { ok: true, wetDensity: convertDensity(sheet.density, sheet.densityUnit, 'kg/m3'), flags: [] }
    }
  }
}

function plainDensityProblem(sheet: PlainSheet): FieldProblem | null {
  if (!Number.isFinite(sheet.density)) return { field: 'density', code: 'missing', message: `Enter the ${sheet.densityIs} density.` }
  if (sheet.density <= 0) return { field: 'density', code: 'not-positive', message: `The ${sheet.densityIs} density must be above zero.` }
  return null
}

/** A dry density is turned wet only for the record; gauge moisture needs the wet density and is read the other way. */
function reduceDryEntry(sheet: PlainSheet): SheetReduction {
  const problem = plainDensityProblem(sheet)
  const dryDensity = problem ? null : convertDensity(sheet.density, sheet.densityUnit, 'kg/m3')
  // Dry density plus the soil's own water is the wet density of the soil.
  const { moisture: own } = sheet
  const water = own.method === 'gauge' ? convertDensity(moistureBesideWall(own.moistureDensity, own.wall), own.densityUnit, 'kg/m3') : 0
  const moisture = reduceMoisture(sheet.moisture, dryDensity === null ? null : dryDensity + water)
  if (dryDensity === null || !moisture.ok) {
    return { ok: false, problems: [...(problem ? [problem] : []), ...(moisture.ok ? [] : moisture.problems)] }
  }
  const wetDensity = wetDensityOf(dryDensity, moisture.percent)
  const absurd = absurdDensity(sheet, dryDensity) ?? absurdDensity(sheet, wetDensity)
  if (absurd) return { ok: false, problems: [absurd] }
  return { ok: true, wetDensity, moisture: moisture.percent, dryDensity, flags: moisture.flags }
}

/** Where a density that no soil has is said, and what to look at. */
const ABSURD: Readonly<Record<RawSheet['method'], { readonly field: string; readonly check: string }>> = {
  'sand-cone': { field: 'moistSoil', check: 'Check the masses and the sand density.' },
  'rubber-balloon': { field: 'moistSoil', check: 'Check the mass, the two readings and their units.' },
  'drive-cylinder': { field: 'cylinderAndSoil', check: 'Check the masses, the volume and their units.' },
  'nuclear-gauge': { field: 'wetDensity', check: 'Check the value and its unit.' },
  plain: { field: 'density', check: 'Check the value and its unit.' },
}

function absurdDensity(sheet: RawSheet, density: number): FieldProblem | null {
  if (density >= LEAST_DENSITY && density <= GREATEST_DENSITY) return null
  const { field, check } = ABSURD[sheet.method]
  const compared = density < LEAST_DENSITY ? 'lighter than any soil' : 'heavier than solid rock'
  return { field, code: 'density-absurd', message: `The density comes to ${densityText(density)}, ${compared}. ${check}` }
}

/** Both units, since either may be the one that was mistaken; a slip by many digits needs no digits. */
function densityText(density: number): string {
  if (!(density < 1e6)) return 'far too much'
  return `${formatQuantity(convertDensity(density, 'kg/m3', 'pcf'), 0, 'pcf')} (${formatQuantity(density, 0, 'kg/m³')})`
}

type Moisture =
  | { readonly ok: true; readonly percent: number; readonly flags: readonly Reason[] }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] }

const refuse = (field: string, code: string, message: string): Moisture => ({
  ok: false,
  problems: [{ field: `moisture.${field}`, code, message }],
})

/** Moisture by any method; `wetDensity` (kg/m³) is null where the density itself could not be read. */
function reduceMoisture(sheet: MoistureSheet, wetDensity: number | null): Moisture {
  switch (sheet.method) {
    case 'oven':
    case 'microwave': {
      const problems = tinProblems(sheet, 'moisture', sheet.massUnit)
      if (problems.length === 0) problems.push(...dryingProblems(sheet, 'moisture'))
      return problems.length > 0 ? { ok: false, problems } : { ok: true, percent: moistureFromTin(sheet), flags: dryingFlags(sheet) }
    }
    case 'carbide': {
      const reading = sheet.readingPercent
      if (!Number.isFinite(reading)) return refuse('readingPercent', 'missing', 'Enter the reading of the carbide gauge.')
      if (reading < 0 || reading > 80) return refuse('readingPercent', 'moisture-range', 'The carbide gauge reads percent of wet mass, 0 to 50.')
      const flags = reading > 50 ? [{ code: 'carbide-range', message: 'Carbide gauges read to 50 % of wet mass. Check the reading.' }] : []
      return { ok: true, percent: moistureFromCarbide(reading), flags }
    }
    case 'stated':
      if (!Number.isFinite(sheet.percent)) return refuse('percent', 'missing', 'Enter the moisture.')
      if (sheet.percent < 0 || sheet.percent > MOST_MOISTURE) {
        return refuse('percent', 'moisture-range', `Moisture is a percentage of the dry mass, 0 to ${MOST_MOISTURE}.`)
      }
      return { ok: true, percent: sheet.percent, flags: [] }
    case 'gauge': {
      if (!Number.isFinite(sheet.moistureDensity)) return refuse('moistureDensity', 'missing', 'Enter the moisture density of the gauge.')
      if (sheet.moistureDensity < 0) return refuse('moistureDensity', 'negative', 'The moisture density cannot be below zero.')
      if (!Number.isFinite(sheet.correctionK)) return refuse('correctionK', 'missing', 'Enter the moisture correction, 0 for none.')
      if (sheet.wall && !Number.isFinite(sheet.wall.offset)) return refuse('wall.offset', 'missing', 'Enter the offset for the wall, with its sign.')
      const besideWall = moistureBesideWall(sheet.moistureDensity, sheet.wall)
      if (besideWall < 0) return refuse('wall.offset', 'moisture-range', 'The offset takes the moisture density below zero. Check its sign and its unit.')
      if (wetDensity === null) return { ok: false, problems: [] }
      const water = convertDensity(besideWall, sheet.densityUnit, 'kg/m3')
      if (water >= wetDensity) {
        return refuse('moistureDensity', 'water-heavier', 'The water weighs as much as the wet soil. Check both readings and their units.')
      }
      const percent = moistureFromGauge(wetDensity, water, sheet.correctionK)
      if (percent < 0) return refuse('correctionK', 'moisture-range', 'The correction takes moisture below zero. Check its sign.')
      if (percent > MOST_MOISTURE) return refuse('moistureDensity', 'moisture-range', `Moisture comes to more than ${MOST_MOISTURE} %. Check both readings.`)
      return { ok: true, percent, flags: sheet.wall ? wallOffsetFlags(sheet.wall) : [] }
    }
  }
}
