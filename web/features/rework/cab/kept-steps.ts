import { z } from 'zod'
import { orderStepInputSchema, type OrderStepInput } from '#shared/schemas/rework.ts'
import { isApiError } from '#web/lib/api-error.ts'

const keptStepSchema = z.object({
  siteId: z.string(),
  orderId: z.string(),
  orderNumber: z.string(),
  step: orderStepInputSchema,
  /** why the server will not take it; it stays until it is put away */
  refused: z.string().nullable(),
})
export type KeptStep = z.infer<typeof keptStepSchema>

const NOTHING: readonly KeptStep[] = []
const keyOf = (userId: string): string => `hardpan.kept-steps.${userId}`

/** Steps tapped on this phone by one person and not taken by the server yet. They stay in its storage, never another's. */
export class KeptSteps {
  readonly #key: string
  readonly #storage: Storage
  readonly #listeners = new Set<() => void>()
  #steps: readonly KeptStep[]

  constructor(userId: string, storage: Storage) {
    this.#key = keyOf(userId)
    this.#storage = storage
    this.#steps = this.#read()
  }

  list = (): readonly KeptStep[] => this.#steps

  subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener)
    return () => this.#listeners.delete(listener)
  }

  add(step: KeptStep): void {
    this.#write([...this.#steps, step])
  }

  drop(id: string): void {
    this.#write(this.#steps.filter((kept) => kept.step.id !== id))
  }

  refuse(id: string, words: string): void {
    this.#write(this.#steps.map((kept) => (kept.step.id === id ? { ...kept, refused: words } : kept)))
  }

  #read(): readonly KeptStep[] {
    try {
      const parsed = z.array(keptStepSchema).safeParse(JSON.parse(this.#storage.getItem(this.#key) ?? '[]'))
      return parsed.success ? parsed.data : NOTHING
    } catch {
      return NOTHING
    }
  }

  #write(steps: readonly KeptStep[]): void {
    this.#steps = steps
    try {
      if (steps.length === 0) this.#storage.removeItem(this.#key)
      else this.#storage.setItem(this.#key, JSON.stringify(steps))
    } catch {
      // A full or forbidden storage: the steps stay on this page at least.
    }
    for (const listener of this.#listeners) listener()
  }
}

export type Sender = (orderId: string, step: OrderStepInput) => Promise<unknown>

/** True where the same step may be taken another time: no answer, a busy server, a session that has run out. */
function mayWait(error: unknown): boolean {
  if (!isApiError(error)) return false
  return error.status === 0 || error.status === 401 || error.status === 403 || error.status === 408 || error.status === 429 || error.status >= 500
}

/**
 * Sends what is kept for a site, oldest first. What the server refuses stays, with its words; what it cannot take now
 * stays and waits. The ids of the steps make a second sending harmless.
 * @returns 'sent' when nothing waits any more, 'waits' without an answer, 'sign-in' when nobody is signed in
 */
export async function sendKept(kept: KeptSteps, siteId: string, send: Sender): Promise<'sent' | 'waits' | 'sign-in'> {
  for (const { step, orderId, refused } of kept.list().filter((own) => own.siteId === siteId)) {
    if (refused !== null) continue
    try {
      await send(orderId, step)
      kept.drop(step.id)
    } catch (error) {
      if (mayWait(error)) return isApiError(error) && (error.status === 401 || error.status === 403) ? 'sign-in' : 'waits'
      kept.refuse(step.id, error instanceof Error ? error.message : 'The server did not take it.')
    }
  }
  return 'sent'
}
