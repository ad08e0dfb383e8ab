import type { FieldProblem } from '#shared/domain/result.ts'

/** A reading of a sheet: its field, its name in a sentence, its value, and whether zero can be right. */
export type Reading = { readonly field: string; readonly name: string; readonly value: number | undefined; readonly mayBeZero?: boolean }

/** What is missing, below zero, or zero where it cannot be, one problem a reading. */
export function readingProblems(readings: readonly Reading[]): FieldProblem[] {
  return readings.flatMap(({ field, name, value, mayBeZero = false }): FieldProblem[] => {
    if (value === undefined || !Number.isFinite(value)) return [{ field, code: 'missing', message: `Enter the ${name}.` }]
    if (value < 0) return [{ field, code: 'negative', message: `The ${name} cannot be below zero.` }]
    if (value === 0 && !mayBeZero) return [{ field, code: 'not-positive', message: `The ${name} must be above zero.` }]
    return []
  })
}
