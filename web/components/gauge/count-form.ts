import { STABILITY_COUNTS } from '#shared/domain/standard-count.ts'
import { recordCountSchema, type RecordCount } from '#shared/schemas/gauge.ts'
import type { Units } from '#web/lib/units.ts'

/** A standard count as typed. */
export interface CountForm {
  readonly density: string
  readonly moisture: string
  /** local time of the site */
  readonly countedAt: string
  readonly withStability: boolean
  readonly five: readonly { readonly density: string; readonly moisture: string }[]
  readonly remarks: string
}

export function emptyCount(countedAt: string): CountForm {
  return { density: '', moisture: '', countedAt, withStability: false, five: Array.from({ length: STABILITY_COUNTS }, () => ({ density: '', moisture: '' })), remarks: '' }
}

export type ReadCount = { readonly ok: true; readonly count: RecordCount } | { readonly ok: false; readonly errors: Readonly<Record<string, string>> }

/** A typed figure; what is none is NaN, which the schema refuses. */
export function figure(text: string, units: Units): number {
  const parsed = units.parse.number(text)
  return parsed.ok ? parsed.value : Number.NaN
}

/** The count as it is sent, or what is wrong at which field ("density", "five.2.moisture"). */
export function readCount(id: string, form: CountForm, units: Units): ReadCount {
  const pair = ({ density, moisture }: { density: string; moisture: string }) => ({ density: figure(density, units), moisture: figure(moisture, units) })
  const parsed = recordCountSchema.safeParse({
    id,
    ...pair(form),
    countedAt: units.parse.instant(form.countedAt) ?? '',
    stability: form.withStability ? form.five.map(pair) : null,
    remarks: form.remarks,
  })
  if (parsed.success) return { ok: true, count: parsed.data }
  return { ok: false, errors: Object.fromEntries(parsed.error.issues.toReversed().map((issue) => [issue.path.join('.').replace('stability', 'five'), issue.message])) }
}
