import type { MoistureSheet, RawSheet } from '#shared/domain/field-sheets.ts'
import { convertSheet } from '#shared/exchange/convert-sheet.ts'
import type { ExchangeUnit, UnitGroup } from '#shared/exchange/exchange-units.ts'
import { APPLIED_WORDS, CONFIRMED, CONVENTION_WORDS, FOLLOW_WORDS, METHOD_WORDS, MODE_WORDS, MOISTURE_WORDS, PURPOSE_WORDS, VOLUME_BY_WORDS } from '#shared/exchange/exchange-words.ts'
import { writeSiteTime } from '#shared/exchange/site-time.ts'
import { columnOf, COLUMN_KEYS, UNIT_COLUMN, type ColumnKey, type RowValues } from '#shared/exchange/test-columns.ts'
import type { ExportUnits, ImportTest } from '#shared/schemas/test-exchange.ts'
import type { UnitSystem } from '#shared/units/format.ts'
import { fromMicrometres, type LengthUnit } from '#shared/units/length.ts'

/** The site whose tests are exchanged, as far as a file needs it. */
export interface ExchangeSite {
  readonly timeZone: string
  readonly system: UnitSystem
  readonly planUnit: LengthUnit
}

/** The units of elevations, depths and worked-out densities in a file of a site. */
export const SITE_UNITS = { us: { elevation: 'ft', depth: 'in', density: 'pcf' }, si: { elevation: 'm', depth: 'mm', density: 'kN/m3' } } as const
const SHEET_UNITS = { us: { mass: 'lb', density: 'pcf', volume: 'ft3', length: 'in', tin: 'g', water: 'pcf' }, si: { mass: 'g', density: 'kg/m3', volume: 'cm3', length: 'mm', tin: 'g', water: 'kg/m3' } } as const

/** A test as files carry it; as stored, or as just read. */
export type ExchangeTest = Omit<ImportTest, 'sheet' | 'calibrations'> & { readonly sheet: RawSheet; readonly calibrations: readonly ImportTest['calibrations'][number][] }

/** A whole number's shortest text, or the micrometres of a length in a unit: both come back exactly (length.ts, toMicrometres). */
const length = (um: number | null, unit: LengthUnit): number | undefined => (um === null ? undefined : fromMicrometres(um, unit))

/**
 * A test as a row of a file: what makes it again, in the units asked for.
 * @param units `as-entered` writes readings as they were typed, their units beside them
 */
export function writeRow(test: ExchangeTest, { timeZone, system }: ExchangeSite, units: ExportUnits): RowValues {
  const sheet = units === 'as-entered' ? test.sheet : convertSheet(test.sheet, units)
  const { place, follows } = test
  return withoutBlanks({
    record: test.id,
    purpose: PURPOSE_WORDS[test.purpose],
    followsRecord: follows?.record ?? undefined,
    followKind: follows ? FOLLOW_WORDS[follows.kind] : undefined,
    sampledAt: writeSiteTime(test.sampledAt, timeZone),
    ...('cell' in place ? { cell: place.cell } : { easting: place.easting, northing: place.northing }),
    stake: test.stake ?? undefined,
    lift: test.lift,
    liftConfirmed: test.liftConfirmed ? CONFIRMED : undefined,
    surface: length(test.surfaceUm, SITE_UNITS[system].elevation),
    depth: length(test.depthUm, SITE_UNITS[system].depth),
    curve: test.curve,
    method: METHOD_WORDS[sheet.method],
    ...sheetValues(sheet),
    calibrations: writeCalibrations(test.calibrations),
    gauge: test.gauge ?? undefined,
    ...moistureValues(sheet.moisture),
    moistureGauge: test.moistureGauge ?? undefined,
    oversizePercent: test.oversizePercent ?? undefined,
    remarks: test.remarks,
  })
}

function withoutBlanks(values: Readonly<Partial<Record<ColumnKey, string | number | undefined>>>): RowValues {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined && value !== '')) as RowValues
}

function writeCalibrations(calibrations: ExchangeTest['calibrations']): string {
  return calibrations.map(({ apparatus, performedAt }) => `${apparatus} @ ${new Date(performedAt).toISOString()}`).join('; ')
}

type Values = Partial<Record<ColumnKey, string | number | undefined>>

function sheetValues(sheet: RawSheet): Values {
  switch (sheet.method) {
    case 'sand-cone': {
      const { massUnit, densityUnit, lengthUnit, apparatusBefore, apparatusAfter, coneAndPlate, sandDensity, moistSoil, largestParticle } = sheet
      return { massUnit, densityUnit, lengthUnit, apparatusBefore, apparatusAfter, coneAndPlate, sandDensity, moistSoil, largestParticle }
    }
    case 'rubber-balloon': {
      const { massUnit, volumeUnit, lengthUnit, volumeBefore, volumeAfter, moistSoil, largestParticle } = sheet
      return { massUnit, volumeUnit, lengthUnit, volumeBefore, volumeAfter, moistSoil, largestParticle }
    }
    case 'drive-cylinder': {
      const { massUnit, volumeUnit, lengthUnit, cylinderAndSoil, cylinder, volume, diameter, height, largestParticle } = sheet
      return { massUnit, volumeUnit, lengthUnit, cylinderAndSoil, cylinder, volumeBy: VOLUME_BY_WORDS[sheet.volumeBy], cylinderVolume: volume, cylinderDiameter: diameter, cylinderHeight: height, largestParticle }
    }
    case 'nuclear-gauge': {
      const { densityUnit, lengthUnit, rodDepth, wetDensity, secondWetDensity, standardCounts: counts } = sheet
      return { densityUnit, lengthUnit, gaugeMode: MODE_WORDS[sheet.mode], rodDepth, wetDensity, secondWetDensity, standardDensity: counts?.density, standardMoisture: counts?.moisture, referenceDensity: counts?.referenceDensity, referenceMoisture: counts?.referenceMoisture }
    }
    case 'plain':
      return { densityUnit: sheet.densityUnit, [sheet.densityIs === 'wet' ? 'wetDensity' : 'dryDensity']: sheet.density }
  }
}

function moistureValues(sheet: MoistureSheet): Values {
  const moistureMethod = MOISTURE_WORDS[sheet.method]
  switch (sheet.method) {
    case 'oven':
    case 'microwave':
      return { moistureMethod, tinUnit: sheet.massUnit, wetAndTin: sheet.wetAndTin, dryAndTin: sheet.dryAndTin, tin: sheet.tin, earlier: sheet.earlier?.join(' ') }
    case 'carbide':
      return { moistureMethod, carbideReading: sheet.readingPercent }
    case 'gauge': {
      const { wall } = sheet
      return { moistureMethod, waterUnit: sheet.densityUnit, moistureDensity: sheet.moistureDensity, correctionK: sheet.correctionK, ...(wall ? { wallAppliedBy: APPLIED_WORDS[wall.appliedBy], wallConvention: CONVENTION_WORDS[wall.convention], wallOffset: wall.offset } : {}) }
    }
    case 'stated':
      return { moistureMethod, moisturePercent: sheet.percent }
  }
}

const UNIT_COLUMNS: ReadonlySet<ColumnKey> = new Set(Object.values(UNIT_COLUMN))

/** The columns of a file of this form: unit columns stand only beside readings as entered. */
export function columnsOfFile(units: ExportUnits, format: 'csv' | 'xlsx'): readonly ColumnKey[] {
  return COLUMN_KEYS.filter((key) => {
    const { role } = columnOf(key)
    return role !== 'import' && (role !== 'workbook' || format === 'xlsx') && (units === 'as-entered' || !UNIT_COLUMNS.has(key))
  })
}

/** The unit that every figure of a column has in a file; undefined where each row says its own. */
export function unitOfColumn(key: ColumnKey, { system, planUnit }: ExchangeSite, units: ExportUnits): string | undefined {
  const { unit, group, role } = columnOf(key)
  if (group === undefined) return unit
  const { elevation, depth, density } = SITE_UNITS[system]
  if (role === 'result') return density
  const fixed: Partial<Record<UnitGroup, ExchangeUnit>> = { plan: planUnit, elevation, depth, ...(units === 'as-entered' ? {} : SHEET_UNITS[units]) }
  return fixed[group]
}

/** The head of a column, its unit in brackets where the whole column has one. */
export function headOfColumn(key: ColumnKey, site: ExchangeSite, units: ExportUnits): string {
  const unit = unitOfColumn(key, site, units)
  return unit === undefined ? columnOf(key).label : `${columnOf(key).label} (${unit})`
}
