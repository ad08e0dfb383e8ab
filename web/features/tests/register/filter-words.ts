import type { Purpose } from '#shared/schemas/field-test.ts'
import type { TestFilter } from '#shared/schemas/test-register.ts'
import { METHOD_WORDS, MOISTURE_WORDS, PURPOSE_WORDS } from '#web/features/tests/outcome-words.ts'

/** Yes-or-no parts of a filter: what holds, and what does not. */
export const STANDING_FILTERS = [
  { key: 'current', label: 'Counts in its chain', yes: 'Counts', no: 'Does not count' },
  { key: 'superseded', label: 'Out of force by rework', yes: 'Out of force', no: 'Not out of force' },
  { key: 'voided', label: 'Void', yes: 'Void', no: 'Not void' },
  { key: 'flagged', label: 'Flagged', yes: 'Flagged', no: 'Not flagged' },
  { key: 'near', label: 'Near a limit', yes: 'Near a limit', no: 'Not near a limit' },
  { key: 'retest', label: 'Retest', yes: 'Retests', no: 'No retests' },
] as const

/** Names of what a filter tells by its id. */
export interface FilterNames {
  readonly lot: (id: string) => string | undefined
  readonly material: (id: string) => string | undefined
  readonly curve: (id: string) => string | undefined
  readonly person: (id: string) => string | undefined
  readonly cell: (cell: number) => string
  readonly day: (day: string) => string
}

export interface FilterChip {
  readonly key: keyof TestFilter
  readonly text: string
}

const purposes = (list: readonly Purpose[]): string => list.map((purpose) => PURPOSE_WORDS[purpose].name).join(' or ')

/** What narrows the register beside search, zone, lift and result, which stand in sight. */
export function chipsOf(filter: TestFilter, names: FilterNames): FilterChip[] {
  const { cell, lotId, purpose, method, moistureMethod, materialId, curveId, technicianId, from, to } = filter
  const chips: (readonly [keyof TestFilter, string | undefined])[] = [
    ['cell', cell === undefined ? undefined : `Cell ${names.cell(cell)}`],
    ['lotId', lotId && `Lot ${names.lot(lotId) ?? 'of this site'}`],
    ['purpose', purpose && purposes(purpose)],
    ['method', method && METHOD_WORDS[method].name],
    ['moistureMethod', moistureMethod && `Moisture by ${MOISTURE_WORDS[moistureMethod].name.toLowerCase()}`],
    ['materialId', materialId && (names.material(materialId) ?? 'One material')],
    ['curveId', curveId && `Curve ${names.curve(curveId) ?? 'of this site'}`],
    ['technicianId', technicianId && `By ${names.person(technicianId) ?? 'one person'}`],
    ['from', from && `From ${names.day(from)}`],
    ['to', to && `To ${names.day(to)}`],
    ...STANDING_FILTERS.map(({ key, yes, no }) => [key, filter[key] && (filter[key] === 'true' ? yes : no)] as const),
  ]
  return chips.flatMap(([key, text]) => (text === undefined || text === '' ? [] : [{ key, text }]))
}
