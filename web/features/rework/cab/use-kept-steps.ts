import { useQueryClient } from '@tanstack/react-query'
import { useCallback, useEffect, useMemo, useState, useSyncExternalStore } from 'react'
import type { Order, OrderStepInput } from '#shared/schemas/rework.ts'
import { orderChanged } from '#web/data/order/cache-effects.ts'
import { stepOrder } from '#web/data/order/mutations.ts'
import { KeptSteps, sendKept, type KeptStep } from './kept-steps.ts'

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
  const all = useSyncExternalStore(kept.subscribe, kept.list)
  const [sending, setSending] = useState(false)
  const [signInNeeded, setSignInNeeded] = useState(false)
  const steps = useMemo(() => all.filter((step) => step.siteId === siteId), [all, siteId])
  const waiting = steps.some((step) => step.refused === null)

  const flush = useMemo(() => {
    let running = false
    return async () => {
      if (running) return
      running = true
      setSending(true)
      try {
        let end: Awaited<ReturnType<typeof sendKept>>
        do {
          end = await sendKept(kept, siteId, async (orderId, step) => orderChanged(client, siteId, await stepOrder(siteId, { orderId, step })))
        } while (end === 'sent' && kept.list().some((step) => step.siteId === siteId && step.refused === null))
        setSignInNeeded(end === 'sign-in')
      } finally {
        running = false
        setSending(false)
      }
    }
  }, [client, kept, siteId])

  useEffect(() => {
    if (!waiting) return
    if (live) void flush()
    const again = () => void flush()
    const timer = setInterval(again, TRY_AGAIN_MS)
    window.addEventListener('online', again)
    return () => {
      clearInterval(timer)
      window.removeEventListener('online', again)
    }
  }, [waiting, live, flush])

  const take = useCallback(
    (order: Order, step: OrderStepInput) => {
      kept.add({ siteId, orderId: order.id, orderNumber: order.number, step, refused: null })
      void flush()
    },
    [kept, siteId, flush],
  )
  const putAway = useCallback((id: string) => kept.drop(id), [kept])
  return { steps, sending, signInNeeded, take, putAway }
}
