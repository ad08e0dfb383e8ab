import { z } from 'zod'
import { ROLES } from '#shared/policies/role.ts'

export const roleSchema = z.enum(ROLES, 'Choose one of the five roles')

/** POST /api/sites/:siteId/members: gives somebody with an account a role, or another role. */
export const memberInputSchema = z.object({
  email: z.string().trim().min(1, 'Give the person’s e-mail address').max(320, 'That is longer than any e-mail address'),
  role: roleSchema,
})
export type MemberInput = z.infer<typeof memberInputSchema>

export const memberParamsSchema = z.object({ siteId: z.string(), userId: z.string() })

export const memberSchema = z.object({
  userId: z.string(),
  name: z.string(),
  email: z.string(),
  role: roleSchema,
  updatedAt: z.iso.datetime(),
})
export type Member = z.infer<typeof memberSchema>

export const memberListSchema = z.object({ members: z.array(memberSchema) })
