import { describe, expect, it } from 'vitest'
import { emptyCurveForm, EMPTY_ROW, pasteInto, readCurveForm, readRows, rowsFromPaste } from '#web/features/lab/curves/curve-form.ts'
import { convertDensity } from '#shared/units/density.ts'
import { makeUnits } from '#web/lib/units.ts'
import { CURVE_ID, MATERIAL } from '#tests/factories/curve-view.ts'

const us = makeUnits('us', 'America/Los_Angeles')
const si = makeUnits('si', 'Europe/Vienna')
const form = { ...emptyCurveForm(MATERIAL.id, '2026-11-02T08:00'), code: 'RB-3' }
const typed = { ...form, rows: [['8', '112.8'], ['10', '117.8'], ['12', '120'], ['14', '117.8']].map(([moisture = '', density = '']) => ({ moisture, density })) }

describe('points pasted from a spreadsheet', () => {
  it('are read from two columns, whatever parts them, without their heads', () => {
    expect(rowsFromPaste('Moisture\tDry density\r\n8.1\t112.8\r\n10.2\t117.8\r\n')).toEqual([
      { moisture: '8.1', density: '112.8' },
      { moisture: '10.2', density: '117.8' },
    ])
    expect(rowsFromPaste('8.1; 112.8\n10.2%   1,787.5')).toEqual([
      { moisture: '8.1', density: '112.8' },
      { moisture: '10.2', density: '1,787.5' },
    ])
    expect(rowsFromPaste('12.5')).toEqual([])
  })

  it('go in from the row they were pasted at, and more rows are made for them', () => {
    const pasted = rowsFromPaste('1\t100\n2\t101\n3\t102')
    expect(pasteInto([EMPTY_ROW, EMPTY_ROW], 1, pasted)).toEqual([EMPTY_ROW, ...pasted])
  })
})

describe('the form of a curve', () => {
  it('reads points in the site’s units and leaves blank rows out', () => {
    const { points, errors } = readRows([...typed.rows, EMPTY_ROW], us)
    expect(points).toHaveLength(4)
    expect(points[0]).toEqual({ moisture: 8, dryDensity: convertDensity(112.8, 'pcf', 'kg/m3') })
    expect(errors).toEqual([undefined, undefined, undefined, undefined, undefined])
    expect(readRows([{ moisture: '12', density: '18.85' }], si).points[0]?.dryDensity).toBeCloseTo(convertDensity(18.85, 'kN/m3', 'kg/m3'), 9)
  })

  it('says beside a row what keeps it from being a point', () => {
    expect(readRows([{ moisture: '8', density: 'heavy' }, { moisture: '', density: '120' }], us).errors).toEqual([
      'Dry unit weight: Write it as a plain number, such as 12.5',
      'Moisture: Give a number',
    ])
  })

  it('sends what was typed, with the stones and the laboratory’s own pair where they are given', () => {
    const read = readCurveForm(CURVE_ID, { ...typed, withCoarse: true, coarseGravity: '2.78', withReported: true, reportedDensity: '119.9', reportedMoisture: '12.1', reportedReason: 'As reported' }, us)
    expect(read.ok && read.curve).toMatchObject({
      code: 'RB-3',
      gs: 2.7,
      coarse: { bulkGravity: 2.78, moisture: 0 },
      reported: { optimumMoisture: 12.1, reason: 'As reported' },
      sampledAt: '2026-11-02T16:00:00.000Z',
    })
  })

  it('names every field that cannot be so', () => {
    const read = readCurveForm(CURVE_ID, { ...form, code: ' ', materialId: '', gs: 'x', sampledAt: '', withCoarse: true, coarseGravity: '9' }, us)
    expect(read.ok).toBe(false)
    expect(read.ok ? {} : read.errors).toMatchObject({
      code: 'Give a name',
      materialId: 'Choose a material',
      gs: 'Give a number',
      sampledAt: 'Give a date and time',
      'coarse.bulkGravity': 'Bulk specific gravity is between 1.5 and 6',
    })
  })
})
