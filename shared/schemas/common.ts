import { z } from 'zod'

/** The longest texts that are taken anywhere, by kind. */
export const TEXT_LIMITS = { name: 80, line: 200, remarks: 2_000 } as const

/** Lower case, so that equal ids are equal texts. */
export const idSchema = z.uuid('This record needs an identifier').toLowerCase()
const [EARLIEST, LATEST] = [Date.UTC(1900, 0), Date.UTC(2200, 0)]
/** An instant as ISO-8601 text with its offset; a year of one or two digits is a slip, and another year to the database. */
export const instantSchema = z.iso.datetime({ offset: true, error: 'Give a date and time' }).refine((text) => Date.parse(text) >= EARLIEST && Date.parse(text) < LATEST, 'Give the date with its year, such as 2026')
export const nameSchema = z.string().trim().min(1, 'Give a name').max(TEXT_LIMITS.name, `At most ${TEXT_LIMITS.name} characters`)
export const lineSchema = z.string().trim().max(TEXT_LIMITS.line, `At most ${TEXT_LIMITS.line} characters`)
export const remarksSchema = z.string().trim().max(TEXT_LIMITS.remarks, `At most ${TEXT_LIMITS.remarks} characters`)
export const reasonSchema = z
  .string()
  .trim()
  .min(3, 'Say why, in a few words')
  .max(TEXT_LIMITS.remarks, `At most ${TEXT_LIMITS.remarks} characters`)
/** A finite number; NaN and infinities are refused with plain words. */
export const finiteSchema = z.number({ error: 'Give a number' })
export const percentSchema = finiteSchema.min(0, 'Not below 0 %').max(100, 'Not above 100 %')
export const liftSchema = z.number({ error: 'Choose a lift' }).int().min(0).max(500)
export const cellSchema = z.number().int().min(0).max(2_000_000)
export const cellListSchema = z.array(cellSchema).min(1, 'Choose at least one cell').max(20_000)

export const sitePointSchema = z.object({ easting: finiteSchema, northing: finiteSchema })
export const personSchema = z.object({ id: z.string(), name: z.string() })

export const siteParamsSchema = z.object({ siteId: z.string() })
export const recordParamsSchema = z.object({ siteId: z.string(), id: z.string() })
