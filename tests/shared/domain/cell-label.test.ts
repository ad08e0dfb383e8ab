import { describe, expect, it } from 'vitest'
import { cellLabel, columnLetters, columnOfLetters, parseCellLabel } from '#shared/domain/cell-label.ts'

describe('cell labels', () => {
  it('counts columns A to Z, then AA', () => {
    expect([0, 25, 26, 51, 52, 701, 702].map(columnLetters)).toEqual(['A', 'Z', 'AA', 'AZ', 'BA', 'ZZ', 'AAA'])
  })

  it('reads every column from 0 to 20,000 back', () => {
    const wrong = Array.from({ length: 20_001 }, (_, column) => column).filter((c) => columnOfLetters(columnLetters(c)) !== c)
    expect(wrong).toEqual([])
  })

  it('names the twelfth column and eighth row L8, and reads it in any case', () => {
    expect(cellLabel({ column: 11, row: 7 })).toBe('L8')
    expect(parseCellLabel(' l8 ')).toEqual({ column: 11, row: 7 })
  })

  it('does not read what is no label', () => {
    expect(['', '8', 'L', 'L0', 'L-1', '8L', 'L8.5', 'L 8'].map(parseCellLabel)).toEqual(Array(8).fill(undefined))
    expect(columnOfLetters('A1')).toBeUndefined()
  })
})
