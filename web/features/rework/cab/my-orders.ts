import type { Order } from '#shared/schemas/rework.ts'
import type { KeptStep } from './kept-steps.ts'

const RANK: Readonly<Record<Order['state'], number>> = { working: 0, issued: 1, ready: 2, closed: 3, withdrawn: 3 }

/** Orders of this person, and those nobody is named for: still to be worked, the one in hand first. */
export function myOrders(orders: readonly Order[], name: string): Order[] {
  return orders
    .filter((order) => (order.state === 'issued' || order.state === 'working') && (order.assignedTo === null || sameName(order.assignedTo, name)))
    .sort((a, b) => RANK[a.state] - RANK[b.state] || Number(a.assignedTo === null) - Number(b.assignedTo === null) || a.number.localeCompare(b.number))
}

function sameName(one: string, other: string): boolean {
  return one.trim().toLowerCase() === other.trim().toLowerCase()
}

/** Orders as they stand once what is kept on the phone is taken. */
export function withKept(orders: readonly Order[], kept: readonly KeptStep[]): Order[] {
  return orders.map((order) => {
    const own = kept.filter((step) => step.orderId === order.id && step.refused === null)
    return own.reduce<Order>((now, { step }) => {
      if (step.kind === 'started' && now.state === 'issued') return { ...now, state: 'working', workingSince: step.happenedAt }
      if (step.kind === 'ready' && now.state !== 'ready') return { ...now, state: 'ready', reportedAt: step.happenedAt }
      return now
    }, order)
  })
}
