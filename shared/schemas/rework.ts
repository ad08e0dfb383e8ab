import { z } from 'zod'
import { finiteSchema, idSchema, instantSchema, liftSchema, personSchema, reasonSchema, remarksSchema } from '#shared/schemas/common.ts'

export const orderStateSchema = z.enum(['issued', 'working', 'ready', 'closed', 'withdrawn'])
export const reworkActionSchema = z.enum(['too-loose', 'too-dense', 'too-dry', 'too-wet', 'other'])

/** An order by hand, for ground that no failing test marked. */
export const createOrderSchema = z.object({
  id: idSchema,
  zoneId: idSchema,
  lift: liftSchema.min(1),
  cells: z.array(z.number().int().min(0)).min(1, 'Choose at least one cell').max(20_000),
  actions: z.array(reworkActionSchema).min(1, 'Say what is wrong'),
  remarks: reasonSchema,
})
export const withdrawOrderSchema = z.object({ reason: reasonSchema })
export const editOrderSchema = z.object({ cells: z.array(z.number().int().min(0)).min(1).max(20_000), reason: reasonSchema })

export const orderStepInputSchema = z.discriminatedUnion('kind', [
  z.object({ id: idSchema, kind: z.literal('assigned'), to: z.string().trim().min(1, 'Say who').max(80) }),
  z.object({ id: idSchema, kind: z.literal('started'), happenedAt: instantSchema }),
  z.object({
    id: idSchema,
    kind: z.literal('ready'),
    happenedAt: instantSchema,
    passes: z.number({ error: 'Give the number of passes' }).int().min(0).max(200),
    waterLitres: finiteSchema.min(0).max(1e8),
    depthUm: z.number({ error: 'Give the depth' }).int().min(0).max(3_000_000),
    remarks: remarksSchema,
  }),
  z.object({ id: idSchema, kind: z.literal('help'), happenedAt: instantSchema, remarks: remarksSchema }),
])
export type CreateOrder = z.infer<typeof createOrderSchema>
export type EditOrder = z.infer<typeof editOrderSchema>
export type OrderStepInput = z.infer<typeof orderStepInputSchema>

export const orderStepSchema = z.object({
  kind: z.enum(['issued', 'assigned', 'started', 'ready', 'help', 'reopened', 'edited', 'closed', 'withdrawn']),
  at: instantSchema,
  by: z.string(),
  text: z.string(),
  /** what was reported done */
  done: z.object({ passes: z.number().nullable(), waterLitres: z.number().nullable(), depthUm: z.number().nullable() }).nullable(),
})

export const orderSchema = z.object({
  id: z.string(),
  number: z.string(),
  zoneId: z.string(),
  lift: z.number(),
  lotId: z.string().nullable(),
  cells: z.array(z.number()),
  state: orderStateSchema,
  cause: z.object({ testId: z.string(), number: z.string(), headline: z.string(), rc: z.number(), moisture: z.number() }).nullable(),
  actions: z.array(reworkActionSchema),
  headline: z.string(),
  volumeCm3: z.number(),
  /** positive adds, negative dries; null where moisture is not the trouble */
  waterLitres: z.number().nullable(),
  depthUm: z.number(),
  /** passes and machine of the fill's own placement, as it was rolled */
  passesWanted: z.number().nullable(),
  machine: z.string(),
  assignedTo: z.string().nullable(),
  openedAt: instantSchema,
  workingSince: instantSchema.nullable(),
  reportedAt: instantSchema.nullable(),
  closedAt: instantSchema.nullable(),
  retestsWanted: z.number(),
  retestsPassed: z.number(),
  /** drawn points for the retests still wanted */
  retestPoints: z.array(z.object({ cell: z.number(), easting: z.number(), northing: z.number() })),
  /** sides where the ground falls away, from the step edges: compass words and the cells */
  edges: z.array(z.object({ side: z.string(), cells: z.array(z.number()), dropUm: z.number() })),
  steps: z.array(orderStepSchema),
  openedBy: personSchema,
})
export type Order = z.infer<typeof orderSchema>
export const orderListSchema = z.object({ orders: z.array(orderSchema) })

export const stepAnswerSchema = z.object({ id: z.string(), number: z.string(), revision: z.number() })
export type StepAnswer = z.infer<typeof stepAnswerSchema>
