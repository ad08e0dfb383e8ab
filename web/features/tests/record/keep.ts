import { z } from 'zod'
import type { FieldMethod } from '#shared/domain/field-sheets.ts'
import { fieldMethodSchema } from '#shared/schemas/field-sheet.ts'
import type { Habits, MethodHabits, TestForm } from './test-form.ts'

const DRAFT = 'hardpan.draft.test'
const HABITS = 'hardpan.testing'

/** Storage may be full or forbidden; the sheet works without it. */
function read(storage: () => Storage, key: string): unknown {
  try {
    const text = storage().getItem(key)
    return text === null ? null : JSON.parse(text)
  } catch {
    return null
  }
}

function write(storage: () => Storage, key: string, value: unknown): void {
  try {
    if (value === null) storage().removeItem(key)
    else storage().setItem(key, JSON.stringify(value))
  } catch {
    return
  }
}

const session = (): Storage => window.sessionStorage
const local = (): Storage => window.localStorage

/** The place of a draft: one person, one site, one form by the address it was opened at. */
export function draftKey(userId: string, siteId: string, form: string): string {
  return `${DRAFT}.${userId}.${siteId}.${form}`
}

/** Takes over what has the shape of the empty sheet; anything else of a kept draft is left out. */
function fit<T>(blank: T, kept: unknown): T {
  if (typeof blank === 'string') return (typeof kept === 'string' ? kept : blank) as T
  if (typeof blank !== 'object' || blank === null || typeof kept !== 'object' || kept === null) return blank
  const fields = kept as Record<string, unknown>
  return Object.fromEntries(Object.entries(blank).map(([name, value]) => [name, fit(value as unknown, fields[name])])) as T
}

/** What was typed before a reload or a sign-out; null where nothing was. */
export function readDraft(key: string, blank: TestForm): TestForm | null {
  const kept = read(session, key)
  return typeof kept === 'object' && kept !== null ? fit(blank, kept) : null
}

export function keepDraft(key: string, form: TestForm | null): void {
  write(session, key, form)
}

const unitHabit = z.object({
  massUnit: z.enum(['g', 'kg', 'lb']).optional(),
  densityUnit: z.enum(['kg/m3', 'g/cm3', 'pcf', 'kN/m3', 'lb/yd3']).optional(),
  lengthUnit: z.enum(['mm', 'cm', 'in']).optional(),
  moistureMethod: z.enum(['oven', 'microwave', 'carbide', 'gauge', 'stated']).optional(),
  volumeUnit: z.enum(['cm3', 'in3', 'ft3']).optional(),
  moistureMassUnit: z.enum(['g', 'kg', 'lb']).optional(),
  gaugeId: z.string().optional(),
  calibrations: z.partialRecord(z.enum(['sand-density', 'cone', 'cylinder', 'balloon']), z.string()).optional(),
})
const habitsSchema = z.object({ method: fieldMethodSchema.optional(), byMethod: z.partialRecord(fieldMethodSchema, unitHabit).optional() })

/** How a person measured the last time, on this device. */
export function readHabits(userId: string): Habits {
  const parsed = habitsSchema.safeParse(read(local, `${HABITS}.${userId}`))
  return parsed.success ? (parsed.data as Habits) : {}
}

export function keepHabits(userId: string, method: FieldMethod, used: MethodHabits): void {
  const habits = readHabits(userId)
  write(local, `${HABITS}.${userId}`, { method, byMethod: { ...habits.byMethod, [method]: used } })
}
