import { parseCellLabel } from '#shared/domain/cell-label.ts'
import type { CellLookup } from '#shared/domain/cells.ts'
import { outcomeSchema } from '#shared/schemas/field-test.ts'
import type { TestFilter } from '#web/data/test/queries.ts'

export const PAGE_SIZE = 50

/** What the register's address says: `?zone=&lift=&outcome=&current=1&q=&page=2`. */
export interface RegisterAddress {
  readonly zone: string
  readonly lift: string
  readonly outcome: string
  readonly current: boolean
  readonly q: string
  readonly page: number
}

export function readRegister(search: URLSearchParams): RegisterAddress {
  const page = Number(search.get('page') ?? '1')
  return {
    zone: search.get('zone') ?? '',
    lift: search.get('lift') ?? '',
    outcome: search.get('outcome') ?? '',
    current: search.get('current') === '1',
    q: (search.get('q') ?? '').slice(0, 40),
    page: Number.isSafeInteger(page) && page > 0 ? page : 1,
  }
}

/** True when anything narrows the register. */
export function isNarrowed({ zone, lift, outcome, current, q }: RegisterAddress): boolean {
  return zone !== '' || lift !== '' || outcome !== '' || current || q.trim() !== ''
}

/** What is asked of the server: a search that names a cell of the site asks for that cell. */
export function filterOf({ zone, lift, outcome, current, q, page }: RegisterAddress, lookup: CellLookup): TestFilter {
  const address = parseCellLabel(q)
  const cell = address === undefined ? undefined : lookup.at(address.column, address.row)
  const known = outcomeSchema.safeParse(outcome)
  return {
    offset: (page - 1) * PAGE_SIZE,
    limit: PAGE_SIZE,
    ...(zone === '' ? {} : { zoneId: zone }),
    ...(/^\d{1,3}$/.test(lift) ? { lift: Number(lift) } : {}),
    ...(known.success ? { outcome: [known.data] } : {}),
    ...(current ? { current: 'true' as const } : {}),
    ...(cell !== undefined ? { cell } : q.trim() === '' ? {} : { search: q.trim() }),
  }
}
