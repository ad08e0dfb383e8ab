import { randomUUID } from 'node:crypto'
import type { z } from 'zod'
import type { createMaterialSchema } from '#shared/schemas/lab.ts'

export type MaterialInput = z.infer<typeof createMaterialSchema>

/** What POST …/materials takes: a silty sand that swells 25 % and shrinks 10 %. */
export function materialInput(overrides: Partial<MaterialInput> = {}): MaterialInput {
  const id = randomUUID()
  return {
    id,
    name: `Borrow ${id.slice(0, 4)}`,
    source: 'North cut',
    classification: 'Silty sand',
    swellPercent: 25,
    shrinkPercent: 10,
    ...overrides,
  }
}
