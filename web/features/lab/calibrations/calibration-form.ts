import { calibrate, type CalibrationKind, type CalibrationResult, type CalibrationSheet } from '#shared/domain/calibration.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import type { MassUnit } from '#shared/units/mass.ts'
import type { VolumeUnit } from '#shared/units/volume.ts'
import { parseNumber } from '#web/lib/units.ts'

/** What was measured, as text: columns by their names, one row a trial. */
export type CalibrationForm = {
  readonly kind: CalibrationKind
  readonly massUnit: MassUnit
  readonly volumeUnit: VolumeUnit
  readonly lengthUnit: LengthUnit
  readonly container: string
  readonly containerVolume: string
  readonly trials: readonly Trial[]
}
export type Trial = { readonly a: string; readonly b: string; readonly c: string }

export const EMPTY_TRIAL: Trial = { a: '', b: '', c: '' }
/** As many as are usual. */
const TRIALS = 3

export const KIND_WORDS: Readonly<Record<CalibrationKind, { readonly name: string; readonly gives: string; readonly example: string; readonly standard: string; readonly columns: readonly string[] }>> = {
  'sand-density': { name: 'Sand', gives: 'Bulk density', example: 'Sand, batch 4', standard: 'ASTM D1556', columns: ['Container and sand'] },
  cone: { name: 'Cone and plate', gives: 'Sand that fills them', example: 'Cone 2', standard: 'ASTM D1556', columns: ['Apparatus before', 'Apparatus after'] },
  cylinder: { name: 'Drive cylinder', gives: 'Volume', example: 'Cylinder 7', standard: 'ASTM D2937', columns: ['Inner diameter', 'Height'] },
  balloon: { name: 'Balloon', gives: 'Indicator', example: 'Balloon B-1', standard: 'ASTM D2167', columns: ['Known volume', 'Reading before', 'Reading in it'] },
}
const COLUMNS = ['a', 'b', 'c'] as const

export function emptyCalibrationForm(kind: CalibrationKind, us: boolean): CalibrationForm {
  return { kind, massUnit: 'g', volumeUnit: 'cm3', lengthUnit: us ? 'in' : 'mm', container: '', containerVolume: '', trials: Array.from({ length: TRIALS }, () => EMPTY_TRIAL) }
}

const reading = (text: string): number => {
  const typed = parseNumber(text)
  return typed.ok ? typed.value : Number.NaN
}
const isBlank = (trial: Trial): boolean => COLUMNS.every((column) => trial[column].trim() === '')

/** The rows that hold anything, with their place in the form. */
function filledRows(trials: readonly Trial[]): { readonly trial: Trial; readonly row: number }[] {
  return trials.map((trial, row) => ({ trial, row })).filter(({ trial }) => !isBlank(trial))
}

/** The measurements as they would be sent; what cannot be read is NaN, which the calculation names. */
export function sheetOf(form: CalibrationForm): CalibrationSheet {
  const rows = filledRows(form.trials).map(({ trial }) => trial)
  switch (form.kind) {
    case 'sand-density':
      return { kind: form.kind, massUnit: form.massUnit, volumeUnit: form.volumeUnit, containerVolume: reading(form.containerVolume), container: reading(form.container), filled: rows.map((row) => reading(row.a)) }
    case 'cone':
      return { kind: form.kind, massUnit: form.massUnit, trials: rows.map((row) => ({ before: reading(row.a), after: reading(row.b) })) }
    case 'cylinder': {
      const column = (name: 'a' | 'b') => rows.flatMap((row) => (row[name].trim() === '' ? [] : [reading(row[name])]))
      return { kind: form.kind, lengthUnit: form.lengthUnit, diameters: column('a'), heights: column('b') }
    }
    case 'balloon':
      return { kind: form.kind, volumeUnit: form.volumeUnit, trials: rows.map((row) => ({ known: reading(row.a), before: reading(row.b), after: reading(row.c) })) }
  }
}

/** The column of the form that a measurement is typed in. */
const FIELD_COLUMN: Readonly<Record<string, keyof Trial>> = { filled: 'a', before: 'a', after: 'b', diameters: 'a', heights: 'b', known: 'a' }

/** What the measurements come to, and what is wrong at each field: `container`, `containerVolume`, or a row and column such as `1.a`. */
export function assessCalibration(form: CalibrationForm): { readonly sheet: CalibrationSheet; readonly result: CalibrationResult; readonly problems: ReadonlyMap<string, string> } {
  const sheet = sheetOf(form)
  const result = calibrate(sheet)
  const rows = filledRows(form.trials)
  const problems = new Map<string, string>()
  for (const { field, message } of result.ok ? [] : result.problems) {
    const [head = '', index = '', tail = ''] = field.split('.')
    const balloon: Readonly<Record<string, keyof Trial>> = { known: 'a', before: 'b', after: 'c' }
    const column = (form.kind === 'balloon' ? balloon : FIELD_COLUMN)[tail === '' ? head : tail]
    const place = column === undefined ? field : `${rowOf(form, rows, head, Number(index))}.${column}`
    if (!problems.has(place)) problems.set(place, message)
  }
  return { sheet, result, problems }
}

/** Diameters and heights are counted each for itself, blank places left out; other trials by the rows that hold anything. */
function rowOf(form: CalibrationForm, rows: readonly { readonly row: number; readonly trial: Trial }[], head: string, index: number): number {
  if (form.kind !== 'cylinder') return rows[index]?.row ?? index
  const column = head === 'diameters' ? 'a' : 'b'
  return rows.filter(({ trial }) => trial[column].trim() !== '')[index]?.row ?? index
}
