import { readUnit, type ExchangeUnit } from '#shared/exchange/exchange-units.ts'
import { plainWord } from '#shared/exchange/exchange-words.ts'
import { columnOf, READABLE_KEYS, type ColumnKey, COLUMN_KEYS } from '#shared/exchange/test-columns.ts'

/** What the head of a file's column says. */
export interface MatchedHead {
  /** the column it is, null where it is none that is known */
  readonly key: ColumnKey | null
  /** the unit it names */
  readonly unit: ExchangeUnit | null
  /** worked out from the rest: known, and not read */
  readonly isResult: boolean
}

const UNIT_BEHIND = /^(.*?)\s*[([]\s*([^)\]]*)\s*[)\]]\s*$/s

/** Which column a head means, by its name or one that laboratories use; its unit in brackets or behind a comma. */
export function matchHead(head: string): MatchedHead {
  const bracket = UNIT_BEHIND.exec(head.trim())
  const name = plainWord(bracket?.[1] ?? head)
  const result = COLUMN_KEYS.some((key) => columnOf(key).role === 'result' && plainWord(columnOf(key).label) === name)
  if (result) return { key: null, unit: null, isResult: true }
  const key = name === '' ? undefined : (READABLE_KEYS.find((each) => plainWord(columnOf(each).label) === name) ?? READABLE_KEYS.find((each) => columnOf(each).aliases?.includes(name)))
  return { key: key ?? null, unit: key === undefined || bracket === null ? null : (unitFor(bracket[2] ?? '', key) ?? null), isResult: false }
}

function unitFor(text: string, key: ColumnKey): ExchangeUnit | undefined {
  const { group } = columnOf(key)
  return group === undefined ? undefined : readUnit(text, group)
}

/** The heads of a file; a column is meant once, the first time. */
export function matchHeads(heads: readonly string[]): MatchedHead[] {
  const taken = new Set<ColumnKey>()
  return heads.map((head) => {
    const found = matchHead(head)
    if (found.key === null) return found
    if (taken.has(found.key)) return { ...found, key: null, unit: null }
    taken.add(found.key)
    return found
  })
}

/** Lines looked at for the heads of the columns: laboratories put titles above. */
const LOOKED_AT = 20

/** The line that heads the columns: of the first lines the one with most heads that are known, at least two; else the first. */
export function findHeadLine(rows: readonly (readonly string[])[]): number {
  let best = 0
  let most = 1
  rows.slice(0, LOOKED_AT).forEach((row, index) => {
    const known = matchHeads(row).filter(({ key, isResult }) => key !== null || isResult).length
    if (known > most) [best, most] = [index, known]
  })
  return best
}
