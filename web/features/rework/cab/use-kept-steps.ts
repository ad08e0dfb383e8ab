import { useQueryClient } from '@tanstack/react-query'
import { useCallback, useEffect, useMemo, useSyncExternalStore } from 'react'
import type { Order, OrderStepInput } from '#shared/schemas/rework.ts'
import { orderChanged } from '#web/data/order/cache-effects.ts'
import { stepOrder } from '#web/data/order/mutations.ts'
import { KeptSteps, type KeptStep } from './kept-steps.ts'
import { StepSender } from './step-sender.ts'

const TRY_AGAIN_MS = 15_000

export type KeptWork = {
  readonly steps: readonly KeptStep[]
  readonly sending: boolean
  readonly signInNeeded: boolean
  readonly take: (order: Order, step: OrderStepInput) => void
  readonly putAway: (id: string) => void
}

/** What the person tapped: sent at once where there is a signal, kept on the phone and sent later where there is none. */
export function useKeptSteps(siteId: string, userId: string, live: boolean): KeptWork {
  const client = useQueryClient()
  const kept = useMemo(() => new KeptSteps(userId, window.localStorage), [userId])
  const sender = useMemo(
    () => new StepSender(kept, siteId, async (orderId, step) => orderChanged(client, siteId, await stepOrder(siteId, { orderId, step }))),
    [client, kept, siteId],
  )
  const all = useSyncExternalStore(kept.subscribe, kept.list)
  const { busy, signInNeeded } = useSyncExternalStore(sender.subscribe, sender.state)
  const steps = useMemo(() => all.filter((step) => step.siteId === siteId), [all, siteId])
  const waiting = steps.some((step) => step.refused === null)

  useEffect(() => {
    if (!waiting) return
    const again = () => void sender.flush()
    if (live) again()
    const timer = setInterval(again, TRY_AGAIN_MS)
    window.addEventListener('online', again)
    return () => {
      clearInterval(timer)
      window.removeEventListener('online', again)
    }
  }, [waiting, live, sender])

  const take = useCallback(
    (order: Order, step: OrderStepInput) => {
      kept.add({ siteId, orderId: order.id, orderNumber: order.number, step, refused: null })
      void sender.flush()
    },
    [kept, siteId, sender],
  )
  const putAway = useCallback((id: string) => kept.drop(id), [kept])
  return { steps, sending: busy, signInNeeded, take, putAway }
}
