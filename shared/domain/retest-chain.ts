/** A test's place in its chain: the first, a retest after rework, or a re-run of a doubtful reading. */
export type ChainKind = 'retest' | 're-run'

/** One test of a chain; `isVoid` once it has been voided, with its reason kept elsewhere. */
export type ChainEntry = { readonly name: string; readonly isVoid: boolean }

const LETTER: Record<ChainKind, string> = { retest: 'R', 're-run': 'C' }
const NAME = /^T-(\d{4,9})(?:-([RC])([1-9]\d{0,3}))?$/

/**
 * The name of a site's n-th test: T-0142. Numbers above 9999 simply grow.
 * @param n whole, from 1
 */
export function formatTestNumber(n: number): string {
  return `T-${String(n).padStart(4, '0')}`
}

/** A test name taken apart: its number, and which retest or re-run it is (null for the first of its chain). */
export type ParsedTestName = {
  readonly number: number
  readonly follow: { readonly kind: ChainKind; readonly sequence: number } | null
}

/** Reads a test name: T-0142, T-0142-R1, T-0218-C1. Null when it is none. */
export function parseTestName(name: string): ParsedTestName | null {
  const match = NAME.exec(name)
  if (!match) return null
  const [, number, letter, sequence] = match
  const follow = letter ? ({ kind: letter === 'R' ? 'retest' : 're-run', sequence: Number(sequence) } as const) : null
  return { number: Number(number), follow }
}

/**
 * The name of the next test of a chain. Voided names are never used again, and retests and re-runs count apart.
 * @param chain every test of the chain, void ones too, in any order
 * @returns the name, or null when the chain is empty or holds a foreign name
 */
export function nextChainName(chain: readonly ChainEntry[], kind: ChainKind): string | null {
  const parsed = chain.map((entry) => parseTestName(entry.name))
  const first = parsed[0]
  if (!first) return null
  let last = 0
  for (const name of parsed) {
    if (name?.number !== first.number) return null
    if (name.follow?.kind === kind) last = Math.max(last, name.follow.sequence)
  }
  return `${formatTestNumber(first.number)}-${LETTER[kind]}${last + 1}`
}

/**
 * The result that counts for a chain: its last that is not void.
 * @param chain in the order the tests were taken
 * @returns the entry, or null when all are void
 */
export function currentOf<T extends { readonly isVoid: boolean }>(chain: readonly T[]): T | null {
  return chain.findLast((entry) => !entry.isVoid) ?? null
}
