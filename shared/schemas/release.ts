import { z } from 'zod'
import { cellSchema, idSchema, instantSchema, liftSchema, personSchema, reasonSchema, remarksSchema } from '#shared/schemas/common.ts'

export const createReleaseSchema = z.object({
  id: idSchema,
  zoneId: idSchema,
  lift: liftSchema,
  cells: z.array(cellSchema).min(1, 'Choose at least one cell').max(20_000),
  happenedAt: instantSchema,
  /** why it is released although the frequency is short; goes to the owner */
  overrideReason: reasonSchema.nullable(),
  remarks: remarksSchema,
})
export type CreateRelease = z.infer<typeof createReleaseSchema>

export const releaseCheckInputSchema = createReleaseSchema.pick({ zoneId: true, lift: true, cells: true })
const findingSchema = z.object({ code: z.string(), message: z.string(), cells: z.array(z.number()) })
export const releaseCheckSchema = z.object({
  red: z.array(findingSchema),
  amber: z.array(findingSchema),
  /** a red finding that a reason may override */
  overridable: z.boolean(),
  hold: z.boolean(),
  volumeCm3: z.number(),
})
export type ReleaseCheck = z.infer<typeof releaseCheckSchema>

export const releaseStatusSchema = z.enum(['asked', 'awaiting-acceptance', 'released', 'declined'])
export const releaseSchema = z.object({
  id: z.string(),
  number: z.string(),
  zoneId: z.string(),
  lift: z.number(),
  cells: z.array(z.object({ cell: z.number(), revoked: z.object({ at: instantSchema, reason: z.string() }).nullable() })),
  volumeCm3: z.number(),
  status: releaseStatusSchema,
  hold: z.boolean(),
  askedBy: personSchema.nullable(),
  issuedBy: personSchema.nullable(),
  issuedAt: instantSchema.nullable(),
  acceptedBy: personSchema.nullable(),
  acceptedAt: instantSchema.nullable(),
  declinedReason: z.string().nullable(),
  overrideReason: z.string().nullable(),
  remarks: z.string(),
})
export type Release = z.infer<typeof releaseSchema>
export const releaseListSchema = z.object({ releases: z.array(releaseSchema) })
export const declineReleaseSchema = z.object({ reason: reasonSchema })
export const issueReleaseSchema = z.object({ overrideReason: reasonSchema.nullable() })
