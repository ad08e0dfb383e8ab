import type { GroundState } from '#shared/domain/ground-state.ts'
import type { Order } from '#shared/schemas/rework.ts'
import type { Units } from '#web/lib/units.ts'

export const isOpen = (order: Pick<Order, 'state'>): boolean => order.state === 'issued' || order.state === 'working' || order.state === 'ready'

/** State of the ground an open order holds. */
export const groundOf = (order: Pick<Order, 'state'>): GroundState => (order.state === 'ready' ? 'awaiting-retest' : 'rework')

/** Where an order stands and since when: "Working since 09:12". Times of another day carry their date. */
export function standingWords(order: Order, units: Units, now: number): string {
  const at = (instant: string | null) => {
    if (instant === null) return ''
    return units.date(instant) === units.date(now) ? units.time(instant) : units.dateTime(instant)
  }
  switch (order.state) {
    case 'issued':
      return `Issued ${at(order.openedAt)}, not started`
    case 'working':
      return `Working since ${at(order.workingSince)}`
    case 'ready':
      return `Reported done ${at(order.reportedAt)}, waits for its retest`
    case 'closed':
      return `Closed ${at(order.closedAt)}`
    case 'withdrawn':
      return `Withdrawn ${at(order.closedAt)}`
  }
}

/** "1 of 2", or a dash where no retest is wanted yet. */
export function retestWords({ state, retestsPassed, retestsWanted }: Order): string {
  return state === 'withdrawn' || retestsWanted === 0 ? '–' : `${retestsPassed} of ${retestsWanted}`
}

export interface WorkStep {
  readonly what: string
  /** how much of it, null where the order does not say */
  readonly figure: string | null
}

/** A whole figure without its nought: nobody scarifies to a tenth of an inch. */
const plainly = (figure: string): string => figure.replace(/\.0(?=\D)/, '')

const turnsSoil = (order: Order): boolean => order.actions.some((action) => action === 'too-dry' || action === 'too-wet' || action === 'too-dense')

/** What to do to the ground, in the order it is done, each with its figure. */
export function stepsToTake(order: Order, units: Units): WorkStep[] {
  const litres = order.waterLitres ?? 0
  const steps: WorkStep[] = []
  if (turnsSoil(order)) steps.push({ what: 'Scarify full depth', figure: order.depthUm > 0 ? plainly(units.thickness(order.depthUm)) : null })
  if (order.actions.includes('too-dry') || (order.actions.includes('too-wet') && litres > 0)) {
    steps.push({ what: 'Add water, mix until even', figure: litres > 0 ? units.water(litres) : null })
  } else if (order.actions.includes('too-wet')) {
    steps.push({ what: 'Dry it back, mix until even', figure: litres < 0 ? `lose ${units.water(-litres)}` : null })
  }
  if (order.actions.some((action) => action !== 'other')) {
    const roller = order.machine === '' ? '' : `, ${order.machine.charAt(0).toLowerCase()}${order.machine.slice(1)}`
    const passes = order.passesWanted
    steps.push({
      what: order.actions.includes('too-dense') ? `Roll lighter${roller}` : `Re-roll${roller}`,
      figure: passes === null ? null : `${passes} ${passes === 1 ? 'pass' : 'passes'}`,
    })
  }
  return steps
}

const joined = (words: readonly string[]): string => (words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`)

/** The caution about open edges beside the work, or null where no ground falls away. */
export function edgeWords({ edges }: Pick<Order, 'edges'>): string | null {
  const sides = [...new Set(edges.map((edge) => edge.side))]
  if (sides.length === 0) return null
  return sides.length === 1
    ? `Stay back from the open edge on the ${sides[0] ?? ''} side, as the site safety plan says.`
    : `Stay back from the open edges on the ${joined(sides)} sides, as the site safety plan says.`
}

/** Water in a clause for a register: "add 5,680 gal", "lose 300 gal"; else what is wrong with the ground. */
export function remedyWords(order: Order, units: Units): string {
  const litres = Math.round(order.waterLitres ?? 0)
  if (litres > 0) return `add ${units.water(litres)}`
  if (litres < 0) return `lose ${units.water(-litres)}`
  const [last] = stepsToTake(order, units).slice(-1)
  return last === undefined ? 'as the lead says' : [last.what.toLowerCase(), last.figure].filter((part) => part !== null).join(', ')
}
