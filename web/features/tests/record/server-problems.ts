import { z } from 'zod'
import { isApiError } from '#web/lib/api-error.ts'
import { formField } from './read-sheet.ts'
import type { PlaceBy, TestForm } from './test-form.ts'

const issuesSchema = z.object({ issues: z.array(z.object({ path: z.string(), message: z.string() })) })
const liftSchema = z.object({ lift: z.number().nullable() })

const PLACE_FIELD: Readonly<Record<PlaceBy, string>> = { stake: 'stakeId', cell: 'cell', point: 'easting' }
const FIELDS: Readonly<Record<string, string>> = { oversizePercent: 'oversize', depthUm: 'depth', surfaceUm: 'elevation' }

export interface ServerProblems {
  /** by field of the form */
  readonly fields: ReadonlyMap<string, string>
  /** what belongs to no field, or the whole of it */
  readonly message: string
}

/** What the server said against a test, each at the field it is about. */
export function serverProblems(error: Error, form: Pick<TestForm, 'method' | 'placeBy'>): ServerProblems {
  if (!isApiError(error)) return { fields: new Map(), message: 'Something went wrong on this page. Nothing was saved; what you typed is still here.' }
  if (error.code === 'unreachable') return { fields: new Map(), message: 'The server does not answer. What you typed is kept on this device; save again when there is signal.' }
  const parsed = issuesSchema.safeParse(error.details)
  const fields = new Map<string, string>()
  for (const { path, message } of parsed.success ? parsed.data.issues : []) {
    const field = fieldOf(path.replace(/^body\./, ''), form)
    if (field !== null && !fields.has(field)) fields.set(field, message)
  }
  return { fields, message: error.message }
}

function fieldOf(path: string, { method, placeBy }: Pick<TestForm, 'method' | 'placeBy'>): string | null {
  if (path.startsWith('sheet.')) return formField(method, path.slice('sheet.'.length))
  const [top = ''] = path.split('.')
  if (top === 'at') return PLACE_FIELD[placeBy]
  if (top === 'follows' || top === 'sheet' || top === 'id') return null
  return FIELDS[top] ?? top
}

/** The lift the elevation lies in, of a 409 lift_differs; undefined for any other error. */
export function differingLift(error: Error | null): { readonly lift: number | null } | undefined {
  if (error === null || !isApiError(error) || error.code !== 'lift_differs') return undefined
  const parsed = liftSchema.safeParse(error.details)
  return { lift: parsed.success ? parsed.data.lift : null }
}
