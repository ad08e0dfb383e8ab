import { describe, expect, it } from 'vitest'
import { emptyCurveForm } from '#web/features/lab/curves/curve-form.ts'
import { labelAlong } from '#web/features/lab/curves/label-along.ts'
import { readGrid } from '#web/features/lab/curves/paste-grid.ts'
import { suitEntry } from '#web/features/lab/curves/suit-entry.ts'

const { entry } = emptyCurveForm(undefined, '', true)
const suit = (heads: string, from = entry) => {
  const { kind, moistureBy, densityUnit, massUnit, tinUnit } = suitEntry(readGrid(`${heads}\n${heads.split('\t').map(() => '1').join('\t')}`), from)
  return { kind, moistureBy, densityUnit, massUnit, tinUnit }
}

describe('the sheet a pasted block was written for', () => {
  it.each([
    ['Moisture %\tDry density kg/m3', { kind: 'dry', moistureBy: 'stated', densityUnit: 'kg/m3' }],
    ['Water content\tWet unit weight (kN/m³)', { kind: 'wet', moistureBy: 'stated', densityUnit: 'kN/m3' }],
    ['w, %\tBulk density, Mg/m³\tDry density, Mg/m³', { kind: 'dry', densityUnit: 'g/cm3' }],
    ['Mould and wet soil, lb\tmoisture', { kind: 'masses', moistureBy: 'stated', massUnit: 'lb' }],
    ['Mold + soil (kg)\tWet soil + tare 1 (g)\tDry soil + tare 1 (g)\tTare 1\tWet soil + tare 2\tDry soil + tare 2\tTare 2', { kind: 'masses', moistureBy: 'two-tins', massUnit: 'kg', tinUnit: 'g' }],
  ])('%s', (heads, expected) => expect(suit(heads)).toMatchObject(expected))

  it('stays as it is without heads, or where none is known', () => {
    expect(suitEntry(readGrid('8\t112.8\n10\t117'), entry)).toBe(entry)
    const masses = { ...entry, kind: 'masses' as const }
    expect(suit('Colour\tSmell', masses)).toMatchObject({ kind: 'masses', moistureBy: 'stated' })
  })
})

describe('a label on its line', () => {
  const run = Array.from({ length: 101 }, (_, i) => ({ x: i * 4, y: i * 3 }))

  it('lies along it, away from what it would cover', () => {
    const free = labelAlong(run, 'zero air voids', 12, [])
    expect(free?.angle).toBeCloseTo((Math.atan2(3, 4) * 180) / Math.PI, 6)
    const moved = labelAlong(run, 'zero air voids', 12, [{ x: free?.x ?? 0, y: free?.y ?? 0 }])
    expect(Math.hypot((moved?.x ?? 0) - (free?.x ?? 0), (moved?.y ?? 0) - (free?.y ?? 0))).toBeGreaterThan(12)
  })

  it('is left out where the line is too short for it', () => {
    expect(labelAlong(run.slice(0, 5), 'zero air voids', 12, [])).toBeNull()
    expect(labelAlong([], '80 %', 12, [])).toBeNull()
  })
})
