import { parseCellLabel } from '#shared/domain/cell-label.ts'
import type { CellLookup } from '#shared/domain/cells.ts'
import { columnsSchema, type ViewContent } from '#shared/schemas/saved-view.ts'
import { registerSortSchema, testFilterSchema, USUAL_SORT, type RegisterKey, type TestFilter } from '#shared/schemas/test-register.ts'
import type { TestFilter as AskedTests } from '#web/data/test/queries.ts'

export const PAGE_SIZE = 50

/** The view that the address names: a saved one by its id, `all` for none, null where it does not say. */
export const NO_VIEW = 'all'

/** What the register's address says: `?lift=3&outcome=fail,suspect&sort=rc&direction=asc&columns=number,rc&page=2`. */
export interface RegisterAddress extends Omit<ViewContent, 'columns'> {
  readonly columns: readonly RegisterKey[]
  readonly page: number
  readonly view: string | null
}

/** What a laboratory reads first; fits a desk's screen. */
export const USUAL_COLUMNS: readonly RegisterKey[] = ['number', 'sampled', 'zone', 'lift', 'cell', 'method', 'dryDensity', 'moisture', 'deviation', 'curve', 'rc', 'rcLimit', 'outcome', 'flags', 'technician']

const FILTER_KEYS = testFilterSchema.keyof().options

/** One part of a filter, left out where it cannot be read: an old link still shows something. */
function readFilter(search: URLSearchParams): TestFilter {
  const given = FILTER_KEYS.flatMap((key) => (search.has(key) ? [[key, search.get(key)] as const] : []))
  const readable = given.filter(([key, value]) => testFilterSchema.safeParse({ [key]: value }).success)
  const filter = testFilterSchema.safeParse(Object.fromEntries(readable))
  return filter.success ? filter.data : {}
}

export function readRegister(search: URLSearchParams): RegisterAddress {
  const page = Number(search.get('page') ?? '1')
  const columns = columnsSchema.safeParse(search.get('columns')?.split(','))
  const sort = registerSortSchema.safeParse({ key: search.get('sort'), direction: search.get('direction') ?? 'desc' })
  return {
    filter: readFilter(search),
    sort: sort.success ? sort.data : USUAL_SORT,
    columns: columns.success ? columns.data : USUAL_COLUMNS,
    page: Number.isSafeInteger(page) && page > 0 ? page : 1,
    view: search.get('view'),
  }
}

/** The address of what is shown; what is usual is left out. */
export function writeRegister({ filter, sort, columns, page, view }: RegisterAddress): URLSearchParams {
  const search = new URLSearchParams()
  for (const key of FILTER_KEYS) {
    const value = filter[key]
    if (value !== undefined && value !== '') search.set(key, String(value))
  }
  if (sort.key !== USUAL_SORT.key || sort.direction !== USUAL_SORT.direction) {
    search.set('sort', sort.key)
    search.set('direction', sort.direction)
  }
  if (columns.join() !== USUAL_COLUMNS.join()) search.set('columns', columns.join())
  if (page > 1) search.set('page', String(page))
  if (view !== null) search.set('view', view)
  return search
}

/** What of an address a view keeps. */
export function contentOf({ filter, sort, columns }: RegisterAddress): ViewContent {
  return { filter, sort, columns: [...columns] }
}

/** Whether two views show the same, however their parts are ordered. */
export function isSameContent(one: ViewContent, other: ViewContent): boolean {
  const text = (content: ViewContent): string => writeRegister({ ...content, page: 1, view: null }).toString()
  return text(one) === text(other)
}

/** True when anything narrows the register. */
export function isNarrowed({ filter }: Pick<RegisterAddress, 'filter'>): boolean {
  return FILTER_KEYS.some((key) => filter[key] !== undefined && filter[key] !== '')
}

/** The condition as the server is asked it: a search that names a cell of the site asks for that cell. */
export function filterOf({ filter }: Pick<RegisterAddress, 'filter'>, lookup: CellLookup): TestFilter {
  const { search, ...rest } = filter
  const text = search?.trim() ?? ''
  if (text === '') return rest
  const label = parseCellLabel(text)
  const cell = label === undefined ? undefined : lookup.at(label.column, label.row)
  return cell === undefined ? { ...rest, search: text } : { ...rest, cell }
}

/** What the page asks the server. */
export function queryOf(address: RegisterAddress, lookup: CellLookup): AskedTests {
  const { sort, page } = address
  return { ...filterOf(address, lookup), sort: sort.key, direction: sort.direction, offset: (page - 1) * PAGE_SIZE, limit: PAGE_SIZE }
}
