import { describe, expect, test } from 'vitest'
import {
  formatArea,
  formatDistance,
  formatEarthVolume,
  formatElevation,
  formatHoleVolume,
  formatMoistureDeviation,
  formatNumber,
  formatPercent,
  formatThickness,
  formatUnitWeight,
  formatWaterVolume,
} from '#shared/units/format.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertVolume, toCubicCentimetres } from '#shared/units/volume.ts'

describe('numbers as the sheet writes them', () => {
  test('a volume is whole, with a comma at the thousand and a thin space before the unit', () => {
    expect(formatEarthVolume(toCubicCentimetres(3410, 'yd3'), 'us')).toBe('3,410\u2009cy')
    expect(formatEarthVolume(2_607_000_000, 'si')).toBe('2,607\u2009m³')
    expect(formatEarthVolume(toCubicCentimetres(1_234_567, 'yd3'), 'us')).toBe('1,234,567\u2009cy')
  })

  test('compaction and moisture go to 0.1, unit weight to 0.1 pcf or 0.01 kN/m³', () => {
    expect(formatPercent(95.83)).toBe('95.8\u2009%')
    expect(formatUnitWeight(convertDensity(112.7, 'pcf', 'kg/m3'), 'us')).toBe('112.7\u2009pcf')
    expect(formatUnitWeight(convertDensity(17.7, 'kN/m3', 'kg/m3'), 'si')).toBe('17.70\u2009kN/m³')
  })

  test('a deviation from optimum carries its sign, a true minus, and none at zero', () => {
    expect(formatMoistureDeviation(-2.846)).toBe('\u22122.8\u2009%')
    expect(formatMoistureDeviation(1.2)).toBe('+1.2\u2009%')
    expect(formatMoistureDeviation(-0.04)).toBe('0.0\u2009%')
    expect(formatMoistureDeviation(0.04)).toBe('0.0\u2009%')
  })

  test('lengths, areas, holes and water follow the site unit system', () => {
    expect(formatElevation(127_805_688, 'us')).toBe('419.31\u2009ft')
    expect(formatElevation(127_805_688, 'si')).toBe('127.806\u2009m')
    expect(formatThickness(203_200, 'us')).toBe('8\u2009in')
    expect(formatThickness(200_660, 'us')).toBe('7.9\u2009in')
    expect(formatThickness(203_200, 'si')).toBe('203\u2009mm')
    expect(formatDistance(15_240, 'us')).toBe('50.0\u2009ft')
    expect(formatDistance(15_240, 'si')).toBe('15.24\u2009m')
    expect(formatArea(232_257_600, 'us')).toBe('2,500\u2009ft²')
    expect(formatHoleVolume(2157.97, 'si')).toBe('2,158\u2009cm³')
    expect(formatHoleVolume(2157.97, 'us')).toBe('0.0762\u2009ft³')
    expect(formatWaterVolume(convertVolume(5680, 'gal', 'cm3'), 'us')).toBe('5,680\u2009gal')
    expect(formatWaterVolume(1_500_400, 'si')).toBe('1,500\u2009L')
    expect(formatArea(1_000_000, 'si')).toBe('1\u2009m²')
  })

  test('a decimal half goes up, as written, not as stored in binary', () => {
    expect(formatNumber(94.95, 1)).toBe('95.0')
    expect(formatNumber(1.005, 2)).toBe('1.01')
  })

  test('what is not a number shows as an en dash and nothing else', () => {
    expect(formatPercent(Number.NaN)).toBe('\u2013')
    expect(formatUnitWeight(Number.POSITIVE_INFINITY, 'us')).toBe('\u2013')
  })
})
