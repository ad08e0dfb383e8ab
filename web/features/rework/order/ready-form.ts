import type { Order, OrderStepInput } from '#shared/schemas/rework.ts'
import type { Units } from '#web/lib/units.ts'

/** What is reported done, as typed in the site's units. */
export type ReadyForm = { readonly passes: string; readonly water: string; readonly depth: string; readonly remarks: string }
export type ReadyErrors = Partial<Record<keyof ReadyForm, string>>
export type ReadyStep = Extract<OrderStepInput, { kind: 'ready' }>

/** Begins with what the order wants, so that a job done as ordered is one tap. */
export function readyFormOf(order: Order, units: Units): ReadyForm {
  return {
    passes: order.passesWanted === null ? '' : String(order.passesWanted),
    water: units.field.waterLitres(Math.max(0, order.waterLitres ?? 0)),
    depth: units.field.thicknessUm(order.depthUm),
    remarks: '',
  }
}

/** The step to send, or what is wrong beside each field. */
export function readReadyForm(form: ReadyForm, units: Units): { readonly ok: true; readonly done: Omit<ReadyStep, 'id' | 'kind' | 'happenedAt'> } | { readonly ok: false; readonly errors: ReadyErrors } {
  const errors: { passes?: string; water?: string; depth?: string; remarks?: string } = {}
  const passes = units.parse.number(form.passes)
  const water = units.parse.waterLitres(form.water)
  const depth = units.parse.thicknessUm(form.depth)
  if (!passes.ok) errors.passes = 'Give the number of passes'
  else if (!Number.isInteger(passes.value) || passes.value < 0 || passes.value > 200) errors.passes = 'Passes are a whole number from 0 to 200'
  if (!water.ok) errors.water = water.reason
  else if (water.value < 0 || water.value > 1e8) errors.water = 'Water added is 0 or more'
  if (!depth.ok) errors.depth = depth.reason
  else if (depth.value < 0 || depth.value > 3_000_000) errors.depth = `A depth from 0 to ${units.thickness(3_000_000)}`
  if (!passes.ok || !water.ok || !depth.ok || Object.keys(errors).length > 0) return { ok: false, errors }
  return { ok: true, done: { passes: passes.value, waterLitres: water.value, depthUm: depth.value, remarks: form.remarks.trim() } }
}
