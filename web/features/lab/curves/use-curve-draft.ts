import { useEffect, useState, type Dispatch, type SetStateAction } from 'react'
import { z } from 'zod'
import type { CurveForm } from './curve-form.ts'

const keptSchema = z.object({ id: z.uuid(), form: z.record(z.string(), z.unknown()) })

function readKept(key: string): { readonly id: string; readonly form: Readonly<Record<string, unknown>> } | null {
  try {
    const parsed = keptSchema.safeParse(JSON.parse(window.sessionStorage.getItem(key) ?? 'null'))
    return parsed.success ? parsed.data : null
  } catch {
    return null
  }
}

function write(key: string, value: unknown): void {
  try {
    if (value === null) window.sessionStorage.removeItem(key)
    else window.sessionStorage.setItem(key, JSON.stringify(value))
  } catch {
    // storage may be full or forbidden; the sheet works without it
    return
  }
}

/** True where a kept sheet still has the shape of this one. */
const fits = (blank: CurveForm, kept: Readonly<Record<string, unknown>>): boolean => Object.entries(blank).every(([name, value]) => typeof kept[name] === typeof value)

export type CurveDraft = {
  readonly id: string
  readonly form: CurveForm
  readonly setForm: Dispatch<SetStateAction<CurveForm>>
  readonly restored: boolean
  readonly startAfresh: () => void
  readonly forget: () => void
}

/** The place of a draft: one person, one site, one curve. */
export function curveDraftKey(userId: string, siteId: string, curve: string): string {
  return `hardpan.draft.curve.${userId}.${siteId}.${curve}`
}

/** A curve's sheet kept on the device while it is typed, so that a reload or a way elsewhere loses nothing. */
export function useCurveDraft(key: string, blank: () => CurveForm): CurveDraft {
  const [start] = useState(() => {
    const empty = blank()
    const kept = readKept(key)
    return kept !== null && fits(empty, kept.form) ? { id: kept.id, form: kept.form as unknown as CurveForm, empty, restored: true } : { id: crypto.randomUUID(), form: empty, empty, restored: false }
  })
  const [id, setId] = useState(start.id)
  const [form, setForm] = useState(start.form)
  const [restored, setRestored] = useState(start.restored)
  useEffect(() => {
    if (form !== start.empty) write(key, { id, form })
  }, [key, id, form, start.empty])
  const forget = () => write(key, null)
  const startAfresh = (): void => {
    forget()
    setId(crypto.randomUUID())
    setForm(start.empty)
    setRestored(false)
  }
  return { id, form, setForm, restored, startAfresh, forget }
}
