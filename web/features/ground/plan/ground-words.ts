import type { Board } from '#shared/schemas/ground.ts'

/** "1 cell", "28 cells". */
export function countOf(n: number, word: string): string {
  return n === 1 ? `1 ${word}` : `${n.toLocaleString('en-US')} ${word}s`
}

/** "lift 10"; lift 0 is the ground the fill stands on. */
export function liftWords(lift: number): string {
  return lift === 0 ? 'foundation' : `lift ${lift}`
}

export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}

/** The first sentence of an order's headline, inside a line: "Too dry. Add water." is "too dry". */
export function faultWords(headline: string): string {
  const [first = ''] = headline.split('.')
  return first.charAt(0).toLowerCase() + first.slice(1)
}

export type NotYetGroup = Board['notYet'][number]
export type ReadyGroup = Board['ready'][number]
