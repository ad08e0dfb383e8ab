import type { LotStanding } from '#shared/domain/lot-facts.ts'
import type { GroundState } from '#shared/domain/ground-state.ts'
import type { Lot } from '#shared/schemas/lot.ts'
import type { Order } from '#shared/schemas/rework.ts'
import type { LotBlock } from '#web/components/drawing/lot-blocks.tsx'
import type { Units } from '#web/lib/units.ts'

export type StandingTone = 'bad' | 'good' | 'plain'
export type StandingWords = { readonly text: string; readonly tone: StandingTone }

export const TONE_CLASS: Readonly<Record<StandingTone, string>> = { bad: 'text-bad font-bold', good: 'text-good font-semibold', plain: 'text-ink-2 font-semibold' }

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)

/** What is short: "owes 2, run 1 again". Re-runs are part of what is owed and said apart. */
function shortWords({ owed, reruns }: Lot): string[] {
  const fresh = Math.max(0, owed - reruns)
  return [...(fresh > 0 ? [`owes ${fresh}`] : []), ...(reruns > 0 ? [`run ${reruns} again`] : [])]
}

/** Where a lot stands, in words and tone: "Owes 2, run 1 again", "Rework R-014", "Released Nov 30". */
export function standingWords(lot: Lot, orders: readonly Order[], units: Units): StandingWords {
  const numbers = orders.map((order) => order.number)
  const say = (first: string, tone: StandingTone): StandingWords => ({ text: capital([first, ...shortWords(lot)].filter((part) => part !== '').join(', ')), tone })
  switch (lot.standing) {
    case 'not-placed':
      return { text: 'Not placed', tone: 'plain' }
    case 'rework':
      return say(['rework', ...numbers].join(' '), 'bad')
    case 'awaiting-retest':
      return say(numbers.length > 0 ? `${numbers.join(', ')} waits for its retest` : 'waits for a retest', 'bad')
    case 'suspect':
    case 'owes':
      return shortWords(lot).length > 0 ? say('', 'bad') : { text: 'Ground waits for a test', tone: 'bad' }
    case 'recheck':
      return { text: 'Recheck after weather', tone: 'bad' }
    case 'waiting-acceptance':
      return { text: 'Waiting for the owner', tone: 'good' }
    case 'waiting-release':
      return { text: 'Waiting for release', tone: 'good' }
    case 'released':
      return { text: lot.releasedAt === null ? 'Released' : `Released ${units.date(lot.releasedAt)}`, tone: 'good' }
  }
}

export const STANDING_FILTERS = ['all', 'short', 'rework', 'waiting', 'released'] as const
export type StandingFilter = (typeof STANDING_FILTERS)[number]

export const FILTER_WORDS: Readonly<Record<StandingFilter, string>> = {
  all: 'All lots',
  short: 'Owe tests or a re-run',
  rework: 'In rework',
  waiting: 'Waiting for release',
  released: 'Released',
}

const REWORK: readonly LotStanding[] = ['rework', 'awaiting-retest']
const WAITING: readonly LotStanding[] = ['waiting-release', 'waiting-acceptance', 'recheck']

export function fitsStanding(lot: Lot, filter: StandingFilter): boolean {
  if (filter === 'all') return true
  if (filter === 'short') return lot.owed > 0 || lot.reruns > 0
  if (filter === 'rework') return REWORK.includes(lot.standing)
  return filter === 'waiting' ? WAITING.includes(lot.standing) : lot.standing === 'released'
}

const BLOCK_STATE: Readonly<Record<Lot['blocks'][number]['state'], GroundState | 'owed'>> = {
  meets: 'meets-spec',
  released: 'released',
  rework: 'rework',
  suspect: 'suspect',
  owed: 'owed',
}

/** A lot's blocks as shares of what one test speaks for. */
export function blocksOf({ blocks, fCm3 }: Lot): LotBlock[] {
  return blocks.map(({ state, cm3 }) => ({ state: BLOCK_STATE[state], share: fCm3 > 0 ? cm3 / fCm3 : 1 }))
}
