import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatCellRange, parseCellRange } from '#shared/domain/cell-range.ts'
import { cellLabel } from '#shared/domain/cell-label.ts'
import { SEEDED } from './plan-arbitraries.ts'

const sheet = { columns: 30, rows: 20 }

function labelsOf(text: string): string[] {
  const result = parseCellRange(text, sheet)
  if (!result.ok) throw new Error(result.reason)
  return result.cells.map(cellLabel)
}

describe('ranges of cells', () => {
  it('reads rectangles and single cells, row by row, each cell once', () => {
    expect(labelsOf('G11:I12, K12, H11')).toEqual(['G11', 'H11', 'I11', 'G12', 'H12', 'I12', 'K12'])
  })

  it('takes the corners in any order and the joints people write', () => {
    const wanted = labelsOf('G11:I13')
    for (const text of ['i13:g11', 'G13 : I11', 'G11 to I13', 'g11-I13', 'G11–I13;', 'G11:I12\nG13:I13']) {
      expect(labelsOf(text)).toEqual(wanted)
    }
  })

  it('names the part that it can not read', () => {
    const reasonOf = (text: string) => {
      const result = parseCellRange(text, sheet)
      return result.ok ? '' : result.reason
    }
    expect(reasonOf('G11, H1x')).toBe('"H1x" is not a cell or a range of cells. Write it like G11 or G11:I13.')
    expect(reasonOf('A1:B2:C3')).toContain('"A1:B2:C3"')
    expect(reasonOf('A1:')).toContain('"A1:"')
    expect(reasonOf('A1, C3:AE4')).toBe('"C3:AE4": AE4 is outside the sheet, which ends at AD20.')
    expect(reasonOf('B21')).toContain('B21 is outside the sheet')
    expect(reasonOf(' , ')).toBe('No cells are named. Write them like G11:I13, K12.')
  })

  it('writes rectangles where the cells form one', () => {
    expect(formatCellRange(parse('K12, G11:I13'))).toBe('G11:I13, K12')
    expect(formatCellRange(parse('A1:C1, A2:B2'))).toBe('A1:C1, A2:B2')
    expect(formatCellRange(parse('B2'))).toBe('B2')
    expect(formatCellRange([])).toBe('')
  })

  it('reads back what it writes, for any set of cells', () => {
    const cell = fc.record({ column: fc.integer({ min: 0, max: 29 }), row: fc.integer({ min: 0, max: 19 }) })
    fc.assert(
      fc.property(fc.array(cell, { minLength: 1, maxLength: 250 }), (cells) => {
        const read = labelsOf(formatCellRange(cells))
        expect(new Set(read)).toEqual(new Set(cells.map(cellLabel)))
      }),
      { ...SEEDED, numRuns: 200 },
    )
  })
})

function parse(text: string) {
  const result = parseCellRange(text, sheet)
  return result.ok ? result.cells : []
}
