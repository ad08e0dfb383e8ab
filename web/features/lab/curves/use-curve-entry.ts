import { useMemo, useState } from 'react'
import { useNavigate } from 'react-router-dom'
import { toast } from 'sonner'
import type { Curve, Material } from '#shared/schemas/lab.ts'
import { paths } from '#web/app/paths.ts'
import { useCorrectCurve, useRecordCurve } from '#web/data/curve/mutations.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { checkMethod, emptyCurveForm, formOfCurve, readCurveForm, type CurveForm } from './curve-form.ts'
import type { EntryForm } from './entry-columns.ts'
import { readEntry } from './read-entry.ts'
import { curveDraftKey, useCurveDraft } from './use-curve-draft.ts'

type CurveEntryInput = { readonly userId: string; readonly materials: readonly Material[]; /** a draft to be put right */ readonly curve: Curve | undefined }

/** The sheet of a curve while it is typed: what it comes to, what is wrong where, and how it is sent. */
export function useCurveEntry({ userId, materials, curve }: CurveEntryInput) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  const navigate = useNavigate()
  const only = materials.length === 1 ? materials[0] : undefined
  const draft = useCurveDraft(curveDraftKey(userId, site.id, curve?.id ?? 'new'), () => (curve === undefined ? emptyCurveForm(only, units.field.instant(now()), site.unitSystem === 'us') : formOfCurve(curve, units)))
  const { id, form, setForm } = draft
  const [asked, setAsked] = useState(false)
  const record = useRecordCurve(site.id, { saysOwnErrors: true })
  const correct = useCorrectCurve(site.id, { saysOwnErrors: true })
  const sending = curve === undefined ? record : correct
  const entry = useMemo(() => readEntry(form.entry), [form.entry])
  const read = readCurveForm(id, form, units)
  const numberOf = (text: string) => {
    const typed = units.parse.number(text)
    return typed.ok ? typed.value : Number.NaN
  }
  const density = units.parse.densityKgM3(form.reportedDensity)
  const moisture = units.parse.number(form.reportedMoisture)
  const leave = (curveId: string | undefined) => void navigate(curveId === undefined ? paths.lab(site.id) : paths.curve(site.id, curveId))
  const save = (focusFirst: () => void): void => {
    setAsked(true)
    if (!read.ok) return focusFirst()
    const onSuccess = (saved: Curve) => {
      draft.forget()
      toast(`${saved.code} is recorded and waits for the lead’s approval.`)
      leave(saved.id)
    }
    if (curve === undefined) record.mutate(read.curve, { onSuccess })
    else correct.mutate({ ...read.curve, id: curve.id }, { onSuccess })
  }
  return {
    form,
    entry,
    restored: draft.restored,
    startAfresh: draft.startAfresh,
    set: (change: Partial<CurveForm>) => setForm((last) => ({ ...last, ...change })),
    setEntry: (change: Partial<EntryForm>) => setForm((last) => ({ ...last, entry: { ...last.entry, ...change } })),
    gs: numberOf(form.gs),
    method: checkMethod(form, numberOf),
    reported: form.withReported && density.ok && moisture.ok ? { maxDryDensity: density.value, optimumMoisture: moisture.value } : null,
    errorOf: (path: string) => (asked && !read.ok ? read.errors[path] : undefined),
    /** how many fields keep the sheet from being sent, once that was tried */
    stopped: asked && !read.ok ? Math.max(1, Object.keys(read.errors).length + entry.errors.filter((error) => error !== undefined).length) : 0,
    refused: sending.error,
    busy: sending.isPending,
    save,
    cancel: () => {
      draft.forget()
      leave(curve?.id)
    },
  }
}

export type CurveEntryState = ReturnType<typeof useCurveEntry>
