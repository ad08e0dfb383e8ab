import type { CellAddress } from './grid.ts'

const LETTERS = 26
const FIRST_LETTER = 65

/**
 * Letters of a column: A … Z, AA … AZ, BA …
 * @param column whole number from 0
 * @returns capital letters
 */
export function columnLetters(column: number): string {
  let letters = ''
  for (let rest = column + 1; rest > 0; rest = Math.floor((rest - 1) / LETTERS)) {
    letters = String.fromCharCode(FIRST_LETTER + ((rest - 1) % LETTERS)) + letters
  }
  return letters
}

/**
 * Column of its letters, the reverse of columnLetters.
 * @param letters one or more letters, capital or small
 * @returns column from 0, or undefined when the text holds anything else
 */
export function columnOfLetters(letters: string): number | undefined {
  if (!/^[a-z]{1,6}$/i.test(letters)) return undefined
  let count = 0
  for (const letter of letters.toUpperCase()) count = count * LETTERS + (letter.charCodeAt(0) - FIRST_LETTER + 1)
  return count - 1
}

/** Label of a cell, such as L8: column letters, then the row counted from 1 at the top. */
export function cellLabel({ column, row }: CellAddress): string {
  return `${columnLetters(column)}${row + 1}`
}

/**
 * Cell of a label, the reverse of cellLabel.
 * @param label such as L8 or l8, blanks around it allowed
 * @returns column and row from 0, or undefined when it is not a label
 */
export function parseCellLabel(label: string): CellAddress | undefined {
  const match = /^\s*([a-z]{1,6})([1-9]\d{0,5})\s*$/i.exec(label)
  const column = match?.[1] === undefined ? undefined : columnOfLetters(match[1])
  if (column === undefined) return undefined
  return { column, row: Number(match?.[2]) - 1 }
}
