import { z } from 'zod'
import { idSchema, nameSchema, personSchema } from '#shared/schemas/common.ts'
import { registerKeySchema, registerSortSchema, testFilterSchema } from '#shared/schemas/test-register.ts'

/** Columns from left to right; a test's number comes first and is always there. */
export const columnsSchema = z
  .array(registerKeySchema)
  .min(1)
  .max(40)
  .refine((columns) => columns[0] === 'number', 'The number comes first')
  .refine((columns) => new Set(columns).size === columns.length, 'A column is shown once')

/** What a view of the register of tests keeps. */
export const viewContentSchema = z.strictObject({ filter: testFilterSchema, sort: registerSortSchema, columns: columnsSchema })
export type ViewContent = z.infer<typeof viewContentSchema>

export const createViewSchema = z.strictObject({ id: idSchema, name: nameSchema, shared: z.boolean(), content: viewContentSchema })
export type CreateView = z.infer<typeof createViewSchema>

/** undefined leaves */
export const editViewSchema = createViewSchema.omit({ id: true }).partial()
export type EditView = z.infer<typeof editViewSchema>

/** The register opens with this view for the person who asks; null for none. */
export const chooseDefaultViewSchema = z.strictObject({ viewId: idSchema.nullable() })
export type ChooseDefaultView = z.infer<typeof chooseDefaultViewSchema>

export const savedViewSchema = z.object({
  id: z.string(),
  name: z.string(),
  shared: z.boolean(),
  author: personSchema,
  content: viewContentSchema,
  /** the one the register opens with, for the person who asks */
  isDefault: z.boolean(),
  /** whether the person who asks may change or remove it */
  mayEdit: z.boolean(),
})
export type SavedView = z.infer<typeof savedViewSchema>
/** GET /api/sites/:siteId/views: one's own and those shared, by name. */
export const savedViewListSchema = z.object({ views: z.array(savedViewSchema) })
