import { z } from 'zod'
import { AppError } from '#api/errors.ts'
import { columnOfPath } from '#shared/exchange/read-row.ts'
import type { ImportTest, RowProblem } from '#shared/schemas/test-exchange.ts'

const issuesSchema = z.object({ issues: z.array(z.object({ path: z.string(), message: z.string() })).min(1) })

/** What an error that recording a test may give says of the row, each at its column; any other error is thrown on. */
export function problemsOf(error: unknown, { place, sheet }: Pick<ImportTest, 'place' | 'sheet'>): RowProblem[] {
  if (!(error instanceof AppError)) throw error
  if (error.code === 'lift_differs') return [{ column: 'lift', message: `${error.message.split('. ')[0]}. Correct the lift, or write Yes under Lift confirmed.` }]
  if (error.status === 403) return [{ column: 'purpose', message: error.message.split('. ')[0] + '.' }]
  const parsed = issuesSchema.safeParse(error.details)
  if (!parsed.success) return [{ column: 'record', message: error.message }]
  return parsed.data.issues.map(({ path, message }) => ({ column: columnFor(path, { place, sheet }), message }))
}

function columnFor(path: string, { place, sheet }: Pick<ImportTest, 'place' | 'sheet'>): string {
  const steps = path.replace(/^body\./, '').split('.')
  if (steps[0] === 'at' && 'cell' in place) return 'cell'
  if (sheet.method === 'plain' && steps[1] === 'density' && sheet.densityIs === 'wet') return 'wetDensity'
  return columnOfPath(steps)
}
