import { sendKept, type KeptSteps, type Sender } from './kept-steps.ts'

export type Sending = { readonly busy: boolean; readonly signInNeeded: boolean }

const IDLE: Sending = { busy: false, signInNeeded: false }

/** Sends what is kept for one site, one run at a time; what is tapped meanwhile goes with it. */
export class StepSender {
  readonly #kept: KeptSteps
  readonly #siteId: string
  readonly #send: Sender
  readonly #listeners = new Set<() => void>()
  #state = IDLE

  constructor(kept: KeptSteps, siteId: string, send: Sender) {
    this.#kept = kept
    this.#siteId = siteId
    this.#send = send
  }

  state = (): Sending => this.#state

  subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener)
    return () => this.#listeners.delete(listener)
  }

  async flush(): Promise<void> {
    if (this.#state.busy) return
    this.#set({ ...this.#state, busy: true })
    let end = await sendKept(this.#kept, this.#siteId, this.#send)
    while (end === 'sent' && this.#waiting()) end = await sendKept(this.#kept, this.#siteId, this.#send)
    this.#set({ busy: false, signInNeeded: end === 'sign-in' })
  }

  #waiting(): boolean {
    return this.#kept.list().some((step) => step.siteId === this.#siteId && step.refused === null)
  }

  #set(state: Sending): void {
    this.#state = state
    for (const listener of this.#listeners) listener()
  }
}
