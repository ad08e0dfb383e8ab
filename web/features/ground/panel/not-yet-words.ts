import type { GroundState } from '#shared/domain/ground-state.ts'
import type { Order } from '#shared/schemas/rework.ts'
import type { GroundPlan } from '#web/features/ground/plan/ground-plan.ts'
import { countOf, faultWords, liftWords, type NotYetGroup } from '#web/features/ground/plan/ground-words.ts'
import type { Units } from '#web/lib/units.ts'

export interface GroupWords {
  readonly title: string
  readonly detail: string
  readonly state: GroundState
}

const SWATCH: Readonly<Record<NotYetGroup['reason'], GroundState>> = {
  'awaiting-inspection': 'awaiting-test',
  'awaiting-test': 'awaiting-test',
  rework: 'rework',
  'awaiting-retest': 'awaiting-retest',
  suspect: 'suspect',
  recheck: 'recheck',
  hold: 'released',
  'awaiting-release': 'meets-spec',
  'awaiting-acceptance': 'meets-spec',
  partial: 'awaiting-test',
  'not-placed': 'not-placed',
  'at-grade': 'released',
}

function titleOf(group: NotYetGroup): string {
  const { reason, owed, orderNumber, headline } = group
  switch (reason) {
    case 'awaiting-inspection':
      return 'Foundation waits for inspection'
    case 'awaiting-test':
      return owed > 0 ? `Waiting for ${countOf(owed, 'test')}` : 'Waiting for a test'
    case 'rework':
      return [`Rework${orderNumber === null ? '' : ` ${orderNumber}`}`, faultWords(headline)].filter((part) => part !== '').join(', ')
    case 'awaiting-retest':
      return `Rework done, ${orderNumber === null ? 'waiting' : `${orderNumber} waits`} for its retest`
    case 'suspect':
      return 'Result can’t be right, run it again'
    case 'recheck':
      return 'To be looked at again after rain or freeze'
    case 'hold':
      return 'On hold, a verification test fails'
    case 'awaiting-release':
      return 'Tests met, waiting for release'
    case 'awaiting-acceptance':
      return 'Waiting for the owner’s acceptance'
    case 'partial':
      return 'Only partly placed'
    case 'not-placed':
      return 'A lift below is not placed'
    case 'at-grade':
      return 'At design grade'
  }
}

/** Water of an order in a clause: what to add, or what to dry off. */
export function waterWords(order: Pick<Order, 'waterLitres'> | undefined, units: Units): string | null {
  const litres = order?.waterLitres ?? null
  if (litres === null || Math.round(litres) === 0) return null
  return litres > 0 ? `add ${units.water(litres)}` : `dry off ${units.water(-litres)}`
}

function standingOf(group: NotYetGroup, units: Units): string | null {
  if (group.workingSince !== null) return `working since ${units.time(group.workingSince)}`
  return group.orderState === 'issued' ? 'not started' : null
}

/** What a group of cells waits for, in a title and a line beneath it. */
export function notYetWords(group: NotYetGroup, plan: GroundPlan, units: Units, order?: Order): GroupWords {
  const cells = countOf(group.cells.length, 'cell')
  const place = `${plan.zone(group.zoneId)?.name ?? ''}, ${liftWords(group.lift)}`
  const say = (detail: string): GroupWords => ({ title: titleOf(group), detail, state: SWATCH[group.reason] })
  switch (group.reason) {
    case 'rework':
      return say([cells, waterWords(order, units), standingOf(group, units)].filter((part) => part !== null).join(', '))
    case 'suspect':
      return say(`${group.testNumber === null ? '' : `${group.testNumber} in `}${place}, ${cells}`)
    case 'awaiting-test':
      return say(`${place}, ${cells}. ${group.stakes.length > 0 ? `Go to ${group.stakes.join(', ')}` : 'No stakes drawn'}`)
    case 'awaiting-inspection':
    case 'at-grade':
      return say(`${plan.zone(group.zoneId)?.name ?? ''}, ${cells}`)
    default:
      return say(`${place}, ${cells}`)
  }
}

/** The groups that stand in the way of fill, without what is already finished. */
export function standingInTheWay(groups: readonly NotYetGroup[]): NotYetGroup[] {
  return groups.filter((group) => group.reason !== 'at-grade')
}
