import { z } from 'zod'
import { GROUP_UNITS, UNIT_GROUPS, type ExchangeUnit, type GroupUnits } from '#shared/exchange/exchange-units.ts'
import { COLUMN_KEYS, type RowCells } from '#shared/exchange/test-columns.ts'

const HABITS = 'hardpan.import.habits'
const WORK = 'hardpan.import.work'
/** Longer than this a table is not kept on the device; its corrections are, for when it is chosen again. */
const MOST_CHARACTERS = 1_500_000

const columnSchema = z.enum(COLUMN_KEYS as [string, ...string[]]).transform((key) => key as (typeof COLUMN_KEYS)[number])
const cellsSchema = z.record(z.string(), z.string()).transform((cells) => Object.fromEntries(Object.entries(cells).filter(([key]) => columnSchema.safeParse(key).success)) as RowCells)
const unitSchema = z.enum([...new Set(Object.values(GROUP_UNITS).flat())] as [string, ...string[]]).transform((unit) => unit as ExchangeUnit)
const habitsSchema = z.object({ heads: z.record(z.string(), columnSchema.nullable()), units: z.partialRecord(z.enum(UNIT_GROUPS), unitSchema), fixed: cellsSchema })

/** How a person read files before: what heads mean, units, and what files do not tell. */
export interface FileHabits {
  readonly heads: Readonly<Record<string, (typeof COLUMN_KEYS)[number] | null>>
  readonly units: Partial<GroupUnits>
  readonly fixed: RowCells
}
export const NO_HABITS: FileHabits = { heads: {}, units: {}, fixed: {} }

const lineCells = z.record(z.string(), cellsSchema)
const workSchema = z.object({
  sha256: z.string(),
  name: z.string(),
  rows: z.array(z.array(z.string())).nullable(),
  settings: z.object({ headLine: z.number(), columns: z.array(columnSchema.nullable()), groupUnits: z.record(z.enum(UNIT_GROUPS), unitSchema), decimal: z.enum(['.', ',']), dateOrder: z.enum(['ymd', 'mdy', 'dmy']), fixed: cellsSchema }),
  edits: lineCells,
  aside: z.record(z.string(), z.string()),
  another: z.array(z.number()),
})
/** An import that is not finished. */
export type ImportWork = z.infer<typeof workSchema>

/** Storage may be full or forbidden; importing works without it. */
function read(key: string): unknown {
  try {
    return JSON.parse(window.localStorage.getItem(key) ?? 'null') as unknown
  } catch {
    return null
  }
}

function write(key: string, value: unknown): void {
  try {
    if (value === null) window.localStorage.removeItem(key)
    else window.localStorage.setItem(key, JSON.stringify(value))
  } catch {
    return
  }
}

export function readHabits(userId: string): FileHabits {
  const parsed = habitsSchema.safeParse(read(`${HABITS}.${userId}`))
  return parsed.success ? (parsed.data as FileHabits) : NO_HABITS
}

export function keepHabits(userId: string, habits: FileHabits): void {
  write(`${HABITS}.${userId}`, habits)
}

const workKey = (userId: string, siteId: string): string => `${WORK}.${userId}.${siteId}`

export function readWork(userId: string, siteId: string): ImportWork | null {
  const parsed = workSchema.safeParse(read(workKey(userId, siteId)))
  return parsed.success ? parsed.data : null
}

/** Keeps an import until it is done; null when it is. */
export function keepWork(userId: string, siteId: string, work: ImportWork | null): void {
  const rows = work?.rows ?? []
  const size = rows.reduce((sum, row) => sum + row.reduce((length, field) => length + field.length + 3, 0), 0)
  write(workKey(userId, siteId), work === null ? null : { ...work, rows: size > MOST_CHARACTERS ? null : work.rows })
}
