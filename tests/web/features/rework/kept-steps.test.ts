import { beforeEach, describe, expect, it } from 'vitest'
import type { OrderStepInput } from '#shared/schemas/rework.ts'
import { KeptSteps, sendKept } from '#web/features/rework/cab/kept-steps.ts'
import { StepSender } from '#web/features/rework/cab/step-sender.ts'
import { ApiError } from '#web/lib/api-error.ts'

const SITE = 'site-1'
const AT = '2026-12-01T22:00:00.000Z'
const step = (n: number): OrderStepInput => ({ id: `00000000-0000-4000-8000-00000000000${n}`, kind: 'started', happenedAt: AT })
const keep = (kept: KeptSteps, n: number, siteId = SITE) => kept.add({ siteId, orderId: `order-${n}`, orderNumber: `R-00${n}`, step: step(n), refused: null })
const refusal = (status: number, message = 'No.') => new ApiError({ status, code: status === 0 ? 'unreachable' : 'x', message })
const fails = (error: Error) => () => Promise.reject(error)

beforeEach(() => localStorage.clear())

describe('steps kept on the phone', () => {
  it('stay there for the person who tapped them, and for nobody else', () => {
    keep(new KeptSteps('dale', localStorage), 1)
    expect(new KeptSteps('dale', localStorage).list().map((kept) => kept.orderNumber)).toEqual(['R-001'])
    expect(new KeptSteps('rosa', localStorage).list()).toEqual([])
  })

  it('are forgotten where the storage holds something else', () => {
    localStorage.setItem('hardpan.kept-steps.dale', '{"not": "steps"}')
    expect(new KeptSteps('dale', localStorage).list()).toEqual([])
  })

  it('go oldest first, with the ids they were tapped with, once each', async () => {
    const kept = new KeptSteps('dale', localStorage)
    keep(kept, 1)
    keep(kept, 2)
    keep(kept, 3, 'another-site')
    const sent: string[] = []
    expect(await sendKept(kept, SITE, async (orderId, { id }) => sent.push(`${orderId} ${id}`))).toBe('sent')
    expect(sent).toEqual([`order-1 ${step(1).id}`, `order-2 ${step(2).id}`])
    expect(kept.list().map((own) => own.siteId)).toEqual(['another-site'])
  })

  it('wait without an answer, before a busy server, and for a session that has run out', async () => {
    const kept = new KeptSteps('dale', localStorage)
    keep(kept, 1)
    expect(await sendKept(kept, SITE, fails(refusal(0)))).toBe('waits')
    expect(await sendKept(kept, SITE, fails(refusal(503)))).toBe('waits')
    expect(await sendKept(kept, SITE, fails(refusal(401)))).toBe('sign-in')
    expect(kept.list()).toHaveLength(1)
    expect(kept.list()[0]?.refused).toBeNull()
  })

  it('stay with the server’s words where it refuses them, and do not hold up the next', async () => {
    const kept = new KeptSteps('dale', localStorage)
    keep(kept, 1)
    keep(kept, 2)
    const end = await sendKept(kept, SITE, async (orderId) => {
      if (orderId === 'order-1') throw refusal(409, 'R-001 is being worked on already. Nothing was changed.')
    })
    expect(end).toBe('sent')
    expect(kept.list().map(({ orderNumber, refused }) => [orderNumber, refused])).toEqual([['R-001', 'R-001 is being worked on already. Nothing was changed.']])
    kept.drop(step(1).id)
    expect(localStorage.getItem('hardpan.kept-steps.dale')).toBeNull()
  })

  it('tapped while others are on their way go in the same run, one at a time', async () => {
    const kept = new KeptSteps('dale', localStorage)
    keep(kept, 1)
    const sent: string[] = []
    const sender = new StepSender(kept, SITE, async (orderId) => {
      if (orderId === 'order-1') keep(kept, 2)
      sent.push(orderId)
    })
    await Promise.all([sender.flush(), sender.flush()])
    expect(sent).toEqual(['order-1', 'order-2'])
    expect(sender.state()).toEqual({ busy: false, signInNeeded: false })
  })
})
