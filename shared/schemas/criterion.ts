import { z } from 'zod'
import { parseLimit } from '#shared/domain/rounding.ts'

const limitText = z
  .string()
  .trim()
  .refine((text) => parseLimit(text) !== null, 'Write the limit as a plain number, such as 95 or 95.0')

const densityUnit = z.enum(['kg/m3', 'g/cm3', 'pcf', 'kN/m3', 'lb/yd3'])

/** One limit of a specification, as written (shared/domain/limits.ts). */
export const criterionSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('rc-min'), text: limitText }),
  z.object({ kind: z.literal('rc-max'), text: limitText }),
  z.object({
    kind: z.literal('rc-min-steps'),
    steps: z.array(z.object({ belowMaxDryPcf: z.number().positive().optional(), text: limitText })).min(1).max(12),
  }),
  z.object({ kind: z.literal('moisture-band'), lowText: limitText, highText: limitText }),
  z.object({ kind: z.literal('saturation-min'), text: limitText }),
  z.object({ kind: z.literal('saturation-max'), text: limitText }),
  z.object({ kind: z.literal('air-voids-max'), text: limitText }),
  z.object({ kind: z.literal('dry-density-min'), text: limitText, unit: densityUnit }),
])

export const roundingSchema = z.discriminatedUnion('method', [
  z.object({ method: z.literal('absolute') }),
  z.object({ method: z.literal('rounding'), ties: z.enum(['even', 'up']) }),
])

/** Frequency rules in shared units (shared/domain/frequency-rule.ts). */
export const frequencyRuleSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('volume'), scope: z.literal('lot'), perCm3: z.number().int().positive() }),
  z.object({ kind: z.literal('area'), perMm2: z.number().int().positive() }),
  z.object({ kind: z.literal('per-lot'), atLeast: z.number().int().min(1).max(50) }),
  z.object({ kind: z.literal('per-lift-day'), atLeast: z.number().int().min(1).max(50) }),
])
