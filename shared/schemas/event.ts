import { z } from 'zod'
import { personSchema } from '#shared/schemas/common.ts'

export const EVENT_PAGE = { usual: 50, most: 200 } as const

/** GET /api/sites/:siteId/events: newest first; `before` is the seq to go on from. */
export const eventQuerySchema = z.object({
  subjectType: z.string().max(32).optional(),
  subjectId: z.string().max(64).optional(),
  before: z.coerce.number().int().positive().optional(),
  limit: z.coerce.number().int().min(1).max(EVENT_PAGE.most).default(EVENT_PAGE.usual),
})
export type EventQuery = z.infer<typeof eventQuerySchema>

export const auditEventSchema = z.object({
  /** place in the site's chain, from 1 */
  seq: z.number().int(),
  revision: z.number().int(),
  actor: personSchema,
  verb: z.string(),
  subject: z.object({ type: z.string(), id: z.string() }),
  payload: z.record(z.string(), z.unknown()),
  happenedAt: z.iso.datetime(),
  recordedAt: z.iso.datetime(),
  /** SHA-256 of this link of the chain, hexadecimal */
  hash: z.string(),
})
export type AuditEvent = z.infer<typeof auditEventSchema>

/** `next` is the `before` of the next page, null at the beginning of the chain. */
export const eventListSchema = z.object({ events: z.array(auditEventSchema), next: z.number().int().nullable() })
