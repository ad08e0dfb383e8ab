import type { Order } from '#shared/schemas/rework.ts'
import { ZONE_ID } from '#tests/factories/site-view.ts'

export const ORDER_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1e01'
export const CAUSE_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1e02'

/** An order as the API answers it: A1 to B2 of lift 3 too dry, 21,501 L (5,680 gal) to add. */
export function buildOrder(overrides: Partial<Order> = {}): Order {
  return {
    id: ORDER_ID,
    number: 'R-014',
    zoneId: ZONE_ID,
    lift: 3,
    lotId: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1e03',
    cells: [0, 1, 4, 5],
    state: 'issued',
    cause: { testId: CAUSE_ID, number: 'T-0142', headline: 'Too dry', rc: 96.1, moisture: 8.2 },
    actions: ['too-dry'],
    headline: 'Too dry. Add water.',
    volumeCm3: 188_780_000,
    waterLitres: 21_501.1,
    depthUm: 203_200,
    passesWanted: 6,
    machine: 'Padfoot',
    assignedTo: null,
    openedAt: '2026-12-01T20:00:00.000Z',
    workingSince: null,
    reportedAt: null,
    closedAt: null,
    retestsWanted: 1,
    retestsPassed: 0,
    retestPoints: [],
    edges: [{ side: 'east', cells: [1, 5], dropUm: 609_600 }],
    steps: [{ kind: 'issued', at: '2026-12-01T20:00:00.000Z', by: 'Theo Lindqvist', text: 'T-0142: Too dry. Add water.', done: null }],
    openedBy: { id: 'theo', name: 'Theo Lindqvist' },
    ...overrides,
  }
}
