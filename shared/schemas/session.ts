import { z } from 'zod'

/** Longest e-mail address (RFC 5321: 64 octets, at sign, 255) and longest password taken in. */
export const EMAIL_MAX = 320
export const PASSWORD_MAX = 1_000

/** The signed-in person, as everyone on their sites may see them. */
export const sessionUserSchema = z.object({ id: z.uuid(), name: z.string().min(1), email: z.string().min(1) })
export type SessionUser = z.infer<typeof sessionUserSchema>

/** GET /api/me: who is signed in, null when nobody is, and the token that every change must carry. */
export const meResponseSchema = z.object({ user: sessionUserSchema.nullable(), csrfToken: z.string().min(1) })
export type MeResponse = z.infer<typeof meResponseSchema>

/** POST /api/session */
export const signInRequestSchema = z.object({
  email: z
    .string()
    .trim()
    .min(1, 'Type your e-mail address.')
    .max(EMAIL_MAX, 'That is longer than any e-mail address.')
    .regex(/^[^\s@]+@[^\s@]+$/, 'An e-mail address has a name, an @ and a domain.'),
  password: z.string().min(1, 'Type your password.').max(PASSWORD_MAX, 'That is longer than any password here.'),
})
export type SignInRequest = z.infer<typeof signInRequestSchema>

/** POST /api/session, 200 */
export const signInResponseSchema = z.object({ user: sessionUserSchema })
export type SignInResponse = z.infer<typeof signInResponseSchema>
