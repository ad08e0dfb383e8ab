import { columnsOf, type EntryForm, type EntryKind, type MoistureBy } from './entry-columns.ts'
import { guessColumns, type Grid } from './paste-grid.ts'

const KINDS: readonly EntryKind[] = ['dry', 'wet', 'masses']
const MOISTURES: readonly MoistureBy[] = ['stated', 'one-tin', 'two-tins']

type Units = Pick<EntryForm, 'densityUnit' | 'massUnit' | 'tinUnit'>

/** How spreadsheets write units at the head of a column. */
const DENSITY_WORDS: readonly (readonly [RegExp, Units['densityUnit']])[] = [
  [/\bpcf\b|lbf?\s*\/\s*(cu\.?\s*ft|ft\s*[³3]|ft\^3)/i, 'pcf'],
  [/kn\s*\/\s*(m\s*[³3]|m\^3|cu\.?\s*m)/i, 'kN/m3'],
  [/kg\s*\/\s*(m\s*[³3]|m\^3|cu\.?\s*m)/i, 'kg/m3'],
  [/(g\s*\/\s*(cm\s*[³3]|cm\^3|cc|ml)|mg\s*\/\s*m\s*[³3]|t\s*\/\s*m\s*[³3])/i, 'g/cm3'],
]
const MASS_WORDS: readonly (readonly [RegExp, Units['massUnit']])[] = [
  [/\bkg\b|kilogram/i, 'kg'],
  [/\blbs?\b|pound/i, 'lb'],
  [/\bg\b|\bgrams?\b/i, 'g'],
]
const unitIn = <U>(words: readonly (readonly [RegExp, U])[], head: string): U | undefined => words.find(([pattern]) => pattern.test(head))?.[1]

/**
 * The sheet a block was written for, as far as its heads say: unit weights or masses, moisture or tins, and their units.
 * Without heads, or where none is known, the sheet stays as it is.
 */
export function suitEntry(grid: Grid, form: EntryForm): EntryForm {
  if (grid.heads === null) return form
  const known = (entry: EntryForm) => guessColumns(grid, entry).filter((column) => column !== null)
  const needed = (entry: EntryForm) => columnsOf(entry).filter(({ key }) => key !== 'wetDensity').map(({ key }) => key)
  const fits = KINDS.flatMap((kind) => MOISTURES.map((moistureBy) => ({ ...form, kind, moistureBy })))
    .map((entry) => ({ entry, columns: known(entry) }))
    .filter(({ entry, columns }) => needed(entry).every((key) => columns.includes(key)))
  const most = Math.max(0, ...fits.map(({ columns }) => columns.length))
  const best = fits.filter(({ columns }) => columns.length === most)
  // what the sheet is already, where the heads leave it open
  const chosen = (best.find(({ entry }) => entry.kind === form.kind && entry.moistureBy === form.moistureBy) ?? best[0])?.entry ?? form
  return { ...chosen, ...unitsOf(grid.heads, grid, chosen) }
}

function unitsOf(heads: readonly string[], grid: Grid, form: EntryForm): Partial<Units> {
  const at = (test: (column: string) => boolean) => guessColumns(grid, form).flatMap((column, place) => (column !== null && test(column) ? [heads[place] ?? ''] : []))
  const density = at((column) => column === 'density').map((head) => unitIn(DENSITY_WORDS, head))[0]
  const mass = at((column) => column === 'soil').map((head) => unitIn(MASS_WORDS, head))[0]
  const tin = at((column) => /\d$/.test(column)).map((head) => unitIn(MASS_WORDS, head))[0]
  return { ...(density === undefined ? {} : { densityUnit: density }), ...(mass === undefined ? {} : { massUnit: mass }), ...(tin === undefined ? {} : { tinUnit: tin }) }
}
