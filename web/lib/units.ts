import { TZDate } from '@date-fns/tz'
import { convertDensity, type DensityUnit } from '#shared/units/density.ts'
import {
  formatArea,
  formatDistance,
  formatEarthVolume,
  formatElevation,
  formatMoistureDeviation,
  formatNumber,
  formatPercent,
  formatSiteArea,
  formatThickness,
  formatUnitWeight,
  formatWaterVolume,
  NO_VALUE,
  type UnitSystem,
} from '#shared/units/format.ts'
import { convertLength, fromMicrometres, toMicrometres, type LengthUnit } from '#shared/units/length.ts'
import { convertVolume, toCubicCentimetres, type VolumeUnit } from '#shared/units/volume.ts'

/** What somebody typed, in SI integers, or why it cannot be taken. */
export type Typed = { readonly ok: true; readonly value: number } | { readonly ok: false; readonly reason: string }

type Marks = { readonly volume: string; readonly elevation: string; readonly thickness: string; readonly distance: string; readonly density: string; readonly water: string; readonly area: string }
type Bases = { readonly volume: VolumeUnit; readonly elevation: LengthUnit; readonly thickness: LengthUnit; readonly distance: LengthUnit; readonly density: DensityUnit; readonly water: VolumeUnit }

const MARKS: Readonly<Record<UnitSystem, Marks>> = {
  us: { volume: 'cy', elevation: 'ft', thickness: 'in', distance: 'ft', density: 'pcf', water: 'gal', area: 'ft²' },
  si: { volume: 'm³', elevation: 'm', thickness: 'mm', distance: 'm', density: 'kN/m³', water: 'L', area: 'm²' },
}
const BASES: Readonly<Record<UnitSystem, Bases>> = {
  us: { volume: 'yd3', elevation: 'ft', thickness: 'in', distance: 'ft', density: 'pcf', water: 'gal' },
  si: { volume: 'm3', elevation: 'm', thickness: 'mm', distance: 'm', density: 'kN/m3', water: 'L' },
}

/** A number as people type it: blanks, thousands separated by commas, a true minus. */
export function parseNumber(text: string): Typed {
  const plain = text.replace(/[\s\u2009\u00a0]/g, '').replace(/^\u2212/, '-')
  const grouped = /^[+-]?\d{1,3}(,\d{3})+(\.\d*)?$/.test(plain) ? plain.replaceAll(',', '') : plain
  if (grouped === '') return { ok: false, reason: 'Give a number' }
  if (!/^[+-]?(\d+\.?\d*|\.\d+)$/.test(grouped)) return { ok: false, reason: 'Write it as a plain number, such as 12.5' }
  return { ok: true, value: Number(grouped) }
}

const plainText = (value: number, decimals: number): string => String(Number(value.toFixed(decimals)))

/** Everything on screen of one site: its unit system and its time zone. Instants are ISO texts or epoch milliseconds. */
export function makeUnits(system: UnitSystem, timeZone: string) {
  const marks = MARKS[system]
  const base = BASES[system]
  const intl = (options: Intl.DateTimeFormatOptions) => new Intl.DateTimeFormat('en-US', { timeZone, hourCycle: 'h23', ...options })
  const clock = intl({ hour: '2-digit', minute: '2-digit' })
  const clockWithSeconds = intl({ hour: '2-digit', minute: '2-digit', second: '2-digit' })
  const day = intl({ month: 'short', day: 'numeric' })
  const dayOfYear = intl({ year: 'numeric', month: 'short', day: 'numeric' })
  const show = (format: Intl.DateTimeFormat, instant: string | number): string => {
    const date = new Date(instant)
    return Number.isNaN(date.getTime()) ? NO_VALUE : format.format(date)
  }
  const typed = (text: string, convert: (value: number) => number): Typed => {
    const parsed = parseNumber(text)
    return parsed.ok ? { ok: true, value: convert(parsed.value) } : parsed
  }
  return {
    system,
    timeZone,
    /** The unit's mark alone, for field labels and column heads: "cy", "in". */
    marks,
    /** compacted or loose volume of ground, cm³ */
    volume: (cm3: number) => formatEarthVolume(cm3, system),
    /** the same, without its unit, for tables whose head names it */
    volumeNumber: (cm3: number) => formatNumber(convertVolume(cm3, 'cm3', base.volume), 0),
    area: (mm2: number) => formatArea(mm2, system),
    /** area of a whole site, mm², in acres or hectares */
    siteArea: (mm2: number) => formatSiteArea(mm2, system),
    elevation: (um: number) => formatElevation(um, system),
    elevationNumber: (um: number) => formatNumber(fromMicrometres(um, base.elevation), system === 'us' ? 2 : 3),
    thickness: (um: number) => formatThickness(um, system),
    /** dry or wet density, kg/m³ */
    density: (kgPerM3: number) => formatUnitWeight(kgPerM3, system),
    densityNumber: (kgPerM3: number) => formatNumber(convertDensity(kgPerM3, 'kg/m3', base.density), system === 'us' ? 1 : 2),
    percent: (value: number, decimals = 1) => formatPercent(value, decimals),
    /** moisture from optimum, points */
    deviation: (points: number) => formatMoistureDeviation(points),
    /** plan distance, mm */
    distance: (mm: number) => formatDistance(mm, system),
    /** water, litres */
    water: (litres: number) => formatWaterVolume(convertVolume(litres, 'L', 'cm3'), system),
    number: (value: number, decimals = 0) => formatNumber(value, decimals),
    /** "14:32" */
    time: (instant: string | number) => show(clock, instant),
    /** "14:32:07" */
    timeWithSeconds: (instant: string | number) => show(clockWithSeconds, instant),
    /** "Dec 1" */
    date: (instant: string | number) => show(day, instant),
    /** "Dec 1, 2026" */
    fullDate: (instant: string | number) => show(dayOfYear, instant),
    /** "Dec 1, 14:32" */
    dateTime: (instant: string | number) => `${show(day, instant)}, ${show(clock, instant)}`,
    /** What was typed in the site's units, as kept: volumes whole cm³, elevations and thicknesses whole µm, distances whole mm. */
    parse: {
      number: parseNumber,
      volumeCm3: (text: string) => typed(text, (value) => toCubicCentimetres(value, base.volume)),
      elevationUm: (text: string) => typed(text, (value) => toMicrometres(value, base.elevation)),
      thicknessUm: (text: string) => typed(text, (value) => toMicrometres(value, base.thickness)),
      distanceMm: (text: string) => typed(text, (value) => Math.round(convertLength(value, base.distance, 'mm'))),
      densityKgM3: (text: string) => typed(text, (value) => convertDensity(value, base.density, 'kg/m3')),
      waterLitres: (text: string) => typed(text, (value) => convertVolume(value, base.water, 'L')),
      /** of a datetime-local field, "2026-12-01T14:32" on the site's clock, as an ISO instant; null when it is none */
      instant: (text: string): string | null => parseLocalTime(text, timeZone),
    },
    /** What stands in a field that holds a kept value: plain digits, without unit or separators. */
    field: {
      volumeCm3: (cm3: number) => plainText(convertVolume(cm3, 'cm3', base.volume), 1),
      elevationUm: (um: number) => plainText(fromMicrometres(um, base.elevation), 3),
      thicknessUm: (um: number) => plainText(fromMicrometres(um, base.thickness), 1),
      distanceMm: (mm: number) => plainText(convertLength(mm, 'mm', base.distance), 2),
      densityKgM3: (kgPerM3: number) => plainText(convertDensity(kgPerM3, 'kg/m3', base.density), 2),
      waterLitres: (litres: number) => plainText(convertVolume(litres, 'L', base.water), 0),
      /** for a datetime-local field, on the site's clock */
      instant: (instant: string | number) => localTimeText(instant, timeZone),
    },
  } as const
}

export type Units = ReturnType<typeof makeUnits>

const twoDigits = (value: number): string => String(value).padStart(2, '0')

function localTimeText(instant: string | number, timeZone: string): string {
  const date = new TZDate(new Date(instant).getTime(), timeZone)
  return `${date.getFullYear()}-${twoDigits(date.getMonth() + 1)}-${twoDigits(date.getDate())}T${twoDigits(date.getHours())}:${twoDigits(date.getMinutes())}`
}

function parseLocalTime(text: string, timeZone: string): string | null {
  const match = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2})/.exec(text)
  if (match === null) return null
  const [year = 0, month = 1, date = 1, hour = 0, minute = 0] = match.slice(1).map(Number)
  const instant = new TZDate(year, month - 1, date, hour, minute, timeZone).getTime()
  return Number.isNaN(instant) ? null : new Date(instant).toISOString()
}
