import { roundToPlace, settle } from '#shared/domain/rounding.ts'
import { convertArea } from '#shared/units/area.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertLength, fromMicrometres } from '#shared/units/length.ts'
import { convertVolume } from '#shared/units/volume.ts'

/** What a site shows: one switch, and everything on screen and paper follows. */
export type UnitSystem = 'us' | 'si'

export const THIN_SPACE = '\u2009'
export const TRUE_MINUS = '\u2212'
/** What stands where there is no number to show. */
export const NO_VALUE = '\u2013'

/**
 * A number as it is written on the sheet: fixed decimals, a comma at each thousand, a true minus, never "−0".
 * @param value any number; one that is not finite is shown as an en dash
 * @param decimals 0 to 6
 */
export function formatNumber(value: number, decimals: number): string {
  if (!Number.isFinite(value)) return NO_VALUE
  const rounded = roundToPlace(Math.abs(value) < 1e9 ? settle(value) : value, decimals, 'up')
  const [whole = '0', fraction] = Math.abs(rounded).toFixed(decimals).split('.')
  const grouped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, ',')
  return `${rounded < 0 ? TRUE_MINUS : ''}${grouped}${fraction ? `.${fraction}` : ''}`
}

/**
 * A value and its unit, a thin space between: "112.7 pcf".
 * @param value in `unit`
 */
export function formatQuantity(value: number, decimals: number, unit: string): string {
  return Number.isFinite(value) ? `${formatNumber(value, decimals)}${THIN_SPACE}${unit}` : NO_VALUE
}

/** A percentage to 0.1, as compaction and moisture are reported (D698 section on reporting): "95.8 %". */
export function formatPercent(value: number, decimals = 1): string {
  return formatQuantity(value, decimals, '%')
}

/** Moisture from optimum, points, signed and to 0.1: "−2.8 %", "+1.2 %", "0.0 %". */
export function formatMoistureDeviation(points: number): string {
  const text = formatPercent(points)
  return roundToPlace(points, 1, 'up') > 0 ? `+${text}` : text
}

/** Dry or wet unit weight from kg/m³: pcf to 0.1, kN/m³ to 0.01. */
export function formatUnitWeight(kgPerM3: number, system: UnitSystem): string {
  return system === 'us'
    ? formatQuantity(convertDensity(kgPerM3, 'kg/m3', 'pcf'), 1, 'pcf')
    : formatQuantity(convertDensity(kgPerM3, 'kg/m3', 'kN/m3'), 2, 'kN/m³')
}

/** A volume of ground from cm³, whole: "3,410 cy" or "2,607 m³". */
export function formatEarthVolume(cm3: number, system: UnitSystem): string {
  return system === 'us'
    ? formatQuantity(convertVolume(cm3, 'cm3', 'yd3'), 0, 'cy')
    : formatQuantity(convertVolume(cm3, 'cm3', 'm3'), 0, 'm³')
}

/** The volume of a hole from cm³: whole cm³, or ft³ to 0.0001. */
export function formatHoleVolume(cm3: number, system: UnitSystem): string {
  return system === 'us'
    ? formatQuantity(convertVolume(cm3, 'cm3', 'ft3'), 4, 'ft³')
    : formatQuantity(cm3, 0, 'cm³')
}

/** A volume of water from cm³, whole gallons or litres. */
export function formatWaterVolume(cm3: number, system: UnitSystem): string {
  return system === 'us'
    ? formatQuantity(convertVolume(cm3, 'cm3', 'gal'), 0, 'gal')
    : formatQuantity(convertVolume(cm3, 'cm3', 'L'), 0, 'L')
}

/** An area from mm², whole square feet or square metres. */
export function formatArea(mm2: number, system: UnitSystem): string {
  return system === 'us'
    ? formatQuantity(convertArea(mm2, 'mm2', 'ft2'), 0, 'ft²')
    : formatQuantity(convertArea(mm2, 'mm2', 'm2'), 0, 'm²')
}

/** The area of a whole site from mm²: acres or hectares to 0.1. */
export function formatSiteArea(mm2: number, system: UnitSystem): string {
  return system === 'us'
    ? formatQuantity(convertArea(mm2, 'mm2', 'ac'), 1, 'ac')
    : formatQuantity(convertArea(mm2, 'mm2', 'ha'), 1, 'ha')
}

/** An elevation from µm: international feet to 0.01, metres to 0.001. */
export function formatElevation(micrometres: number, system: UnitSystem): string {
  return system === 'us'
    ? formatQuantity(fromMicrometres(micrometres, 'ft'), 2, 'ft')
    : formatQuantity(fromMicrometres(micrometres, 'm'), 3, 'm')
}

/** A lift thickness or test depth from µm: inches to 0.1, whole inches without a decimal; whole millimetres. */
export function formatThickness(micrometres: number, system: UnitSystem): string {
  if (system === 'si') return formatQuantity(fromMicrometres(micrometres, 'mm'), 0, 'mm')
  const inches = Math.round(fromMicrometres(micrometres, 'in') * 10) / 10
  return formatQuantity(inches, Number.isInteger(inches) ? 0 : 1, 'in')
}

/** A plan distance from mm: international feet to 0.1, metres to 0.01. */
export function formatDistance(millimetres: number, system: UnitSystem): string {
  return system === 'us'
    ? formatQuantity(convertLength(millimetres, 'mm', 'ft'), 1, 'ft')
    : formatQuantity(convertLength(millimetres, 'mm', 'm'), 2, 'm')
}
