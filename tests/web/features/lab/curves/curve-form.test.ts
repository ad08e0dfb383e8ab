import { describe, expect, it } from 'vitest'
import { convertDensity } from '#shared/units/density.ts'
import { MATERIAL, CURVE_ID, buildCurve } from '#tests/factories/curve-view.ts'
import { emptyCurveForm, formOfCurve, readCurveForm } from '#web/features/lab/curves/curve-form.ts'
import type { EntryForm } from '#web/features/lab/curves/entry-columns.ts'
import { guessColumns, pasteInto, readGrid, rowsOf } from '#web/features/lab/curves/paste-grid.ts'
import { readEntry } from '#web/features/lab/curves/read-entry.ts'
import { makeUnits } from '#web/lib/units.ts'

const us = makeUnits('us', 'America/Los_Angeles')
const si = makeUnits('si', 'Europe/Vienna')
const blank = emptyCurveForm(MATERIAL, '2026-11-02T08:00', true)
const form = { ...blank, code: 'RB-3', gs: '2.70' }
const sheet = (change: Partial<EntryForm>): EntryForm => ({ ...blank.entry, ...change })
const rows = [['8', '112.8'], ['10', '117.8'], ['12', '120'], ['14', '117.8']].map(([moisture = '', density = '']) => ({ moisture, density }))
const typed = { ...form, entry: sheet({ rows }) }

function paste(text: string, entry = blank.entry, from?: 'density') {
  const grid = readGrid(text)
  return rowsOf(grid, guessColumns(grid, entry, from))
}

describe('a block pasted from a spreadsheet', () => {
  it('is read whatever parts it, without its heads', () => {
    const expected = [{ moisture: '8.1', density: '112.8' }, { moisture: '10.2', density: '117.8' }]
    expect(paste('Moisture\tDry density\r\n8.1\t112.8\r\n10.2\t117.8\r\n')).toEqual(expected)
    expect(paste('8.1,112.8\n10.2,117.8')).toEqual(expected)
    expect(paste('8.1 112.8\n10.2 117.8')).toEqual(expected)
    expect(paste('8,1;112,8\n10,2;117,8')).toEqual(expected)
    expect(paste('\uFEFF"Dry unit weight, pcf",w\n112.8,8.1\n117.8,10.2')).toEqual(expected)
  })

  it('goes in from the place it was pasted at, over what stands there', () => {
    expect(paste('100\n101', blank.entry, 'density')).toEqual([{ density: '100' }, { density: '101' }])
    expect(pasteInto([{}, { moisture: '9' }], 1, [{ density: '100' }, { density: '101' }])).toEqual([{}, { moisture: '9', density: '100' }, { density: '101' }])
  })

  it('finds mould and tins by their heads, in any order', () => {
    const entry = sheet({ kind: 'masses', moistureBy: 'one-tin' })
    expect(paste('No.\tMould + soil g\tCan\tDry soil + can\tWet soil + can\n1\t6100\t21.3\t88.4\t95.1', entry)).toEqual([{ soil: '6100', tin1: '21.3', dry1: '88.4', wet1: '95.1' }])
  })
})

describe('the sheet of a curve', () => {
  it('comes to points as it is typed, blank rows left out', () => {
    const read = readEntry(sheet({ rows: [...rows, {}] }))
    expect(read.points).toHaveLength(4)
    expect(read.points[0]).toEqual({ moisture: 8, dryDensity: convertDensity(112.8, 'pcf', 'kg/m3') })
    expect(read.errors).toEqual([undefined, undefined, undefined, undefined, undefined])
    expect(readEntry(emptyCurveForm(undefined, '', false).entry).points).toEqual([])
    expect(readEntry(sheet({ densityUnit: 'kN/m3', rows: [{ moisture: '12', density: '18.85' }] })).points[0]?.dryDensity).toBeCloseTo(convertDensity(18.85, 'kN/m3', 'kg/m3'), 9)
  })

  it('says at the figure what keeps a row from being a point', () => {
    expect(readEntry(sheet({ rows: [{ moisture: '8', density: 'heavy' }, { moisture: '', density: '120' }] })).errors).toEqual([
      { column: 'density', message: 'Dry: Write it as a plain number, such as 12.5' },
      { column: 'moisture', message: 'Enter the moisture.' },
    ])
    const tins = sheet({ kind: 'masses', moistureBy: 'one-tin', mould: '4200', mouldVolume: '944', volumeUnit: 'cm3', rows: [{ soil: '6100', wet1: '80', dry1: '90', tin1: '20' }] })
    expect(readEntry(tins).errors[0]).toMatchObject({ column: 'dry1' })
  })

  it('is sent as it was written down, with the stones and the laboratory’s own pair where they are given', () => {
    const read = readCurveForm(CURVE_ID, { ...typed, layers: '3', blows: '25', withCoarse: true, coarseGravity: '2.78', withReported: true, reportedDensity: '119.9', reportedMoisture: '12.1', reportedReason: 'As reported' }, us)
    expect(read.ok && read.curve).toMatchObject({
      code: 'RB-3',
      gs: 2.7,
      entry: { kind: 'dry', densityUnit: 'pcf' },
      apparatus: { layers: 3, blows: 25, oversizePercent: null },
      coarse: { bulkGravity: 2.78, moisture: 0 },
      reported: { optimumMoisture: 12.1, reason: 'As reported' },
      sampledAt: '2026-11-02T16:00:00.000Z',
    })
  })

  it('comes back from a draft as it was entered', () => {
    const entry = { kind: 'masses' as const, massUnit: 'g' as const, volumeUnit: 'cm3' as const, mould: 4200, mouldVolume: 944, specimens: [{ mouldAndSoil: 6100, moisture: { massUnit: 'g' as const, tins: [{ wetAndTin: 95.1, dryAndTin: 88.4, tin: 21.3 }] } }] }
    const again = formOfCurve(buildCurve({ entry, apparatus: { layers: 3, blows: 25, oversizePercent: null } }), us)
    expect(readEntry(again.entry).entry).toEqual(entry)
    expect(again).toMatchObject({ layers: '3', blows: '25', oversize: '' })
    // a draft of points alone comes back as dry unit weights of the site
    expect(formOfCurve(buildCurve(), si).entry).toMatchObject({ kind: 'dry', densityUnit: 'kN/m3' })
  })

  it('names every field that cannot be so', () => {
    const read = readCurveForm(CURVE_ID, { ...form, code: ' ', materialId: '', gs: 'x', sampledAt: '', oversize: '28', withCoarse: true, coarseGravity: '9' }, us)
    expect(read.ok).toBe(false)
    expect(read.ok || Object.keys(read.errors).sort()).toEqual(['apparatus.oversizePercent', 'coarse.bulkGravity', 'code', 'gs', 'materialId', 'sampledAt'])
  })
})
