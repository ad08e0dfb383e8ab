import { columnOrderingFeature, columnVisibilityFeature, createColumnHelper, metaHelper, rowPaginationFeature, rowSortingFeature, tableFeatures } from '@tanstack/react-table'
import type { ReactNode } from 'react'
import { shownLimit } from '#shared/domain/limits.ts'
import { REGISTER_KEYS, type RegisterKey, type RegisterTest } from '#shared/schemas/test-register.ts'
import { NO_VALUE } from '#shared/units/format.ts'
import type { SiteContextValue } from '#web/lib/site-context.tsx'
import { METHOD_WORDS, MOISTURE_WORDS, PURPOSE_WORDS } from '#web/features/tests/outcome-words.ts'
import { FlagsCell, ResultCell } from './result-cell.tsx'

export interface ColumnMeta {
  /** figures stand at the right */
  readonly numeric: boolean
}

export const registerFeatures = tableFeatures({ rowSortingFeature, rowPaginationFeature, columnOrderingFeature, columnVisibilityFeature, columnMeta: metaHelper<ColumnMeta>() })

type Site = Pick<SiteContextValue, 'units' | 'label' | 'zone'>

interface RegisterColumn {
  /** as lists of columns name it */
  readonly name: string
  /** as the head of the column names it, without its unit */
  readonly head?: string
  readonly unit?: (site: Site) => string
  readonly show: (test: RegisterTest, site: Site) => ReactNode
}

const percent = (): string => '%'
const density = ({ units }: Site): string => units.marks.density
const figure = (value: number | null, { units }: Site): string => (value === null ? NO_VALUE : units.number(value, 1))
/** Points from optimum as a bare figure with its sign; the head names the unit. */
const signed = (points: number, { units }: Site): string => `${points > 0 && units.number(points, 1) !== '0.0' ? '+' : ''}${units.number(points, 1)}`

/** Everything the register can show, in the order it is offered. A column with a unit holds figures. */
export const REGISTER_COLUMNS: Readonly<Record<RegisterKey, RegisterColumn>> = {
  number: { name: 'Number', head: 'Test', show: (test) => test.number },
  sampled: { name: 'Sampled', show: (test, { units }) => units.dateTime(test.sampledAt) },
  zone: { name: 'Zone', show: (test, { zone }) => zone(test.zoneId)?.shortName ?? NO_VALUE },
  lift: { name: 'Lift', unit: () => '', show: (test) => test.lift },
  cell: { name: 'Cell', show: (test, { label }) => label(test.cell) },
  lot: { name: 'Lot', show: (test) => test.lotName ?? NO_VALUE },
  purpose: { name: 'Purpose', show: (test) => PURPOSE_WORDS[test.purpose].name },
  method: { name: 'Method', show: (test) => METHOD_WORDS[test.method].name },
  moistureMethod: { name: 'Moisture by', show: (test) => MOISTURE_WORDS[test.moistureMethod].name },
  wetDensity: { name: 'Wet unit weight', head: 'Wet', unit: density, show: (test, { units }) => units.densityNumber(test.wetDensity) },
  dryDensity: { name: 'Dry unit weight', head: 'Dry', unit: density, show: (test, { units }) => units.densityNumber(test.dryDensity) },
  moisture: { name: 'Moisture', head: 'w', unit: percent, show: (test, site) => figure(test.moisture, site) },
  optimum: { name: 'Optimum used', head: 'Opt.', unit: percent, show: (test, site) => figure(test.optimum, site) },
  deviation: { name: 'Moisture from optimum', head: 'Δw', unit: percent, show: (test, site) => signed(test.moistureDeviation, site) },
  maxDryDensity: { name: 'Maximum dry unit weight used', head: 'Max dry', unit: density, show: (test, { units }) => units.densityNumber(test.maxDryDensity) },
  curve: { name: 'Curve', show: (test) => test.curveCode },
  material: { name: 'Material', show: (test) => test.materialName },
  oversize: { name: 'Oversize', unit: percent, show: (test, site) => figure(test.oversizePercent, site) },
  rc: { name: 'Relative compaction', head: 'RC', unit: percent, show: (test, site) => figure(test.rc, site) },
  rcLimit: { name: 'Compaction required', head: 'Limit', unit: percent, show: (test) => (test.rcLimit === null ? NO_VALUE : shownLimit(test.rcLimit)) },
  saturation: { name: 'Saturation', head: 'S', unit: percent, show: (test, site) => figure(test.saturation, site) },
  airVoids: { name: 'Air voids', unit: percent, show: (test, site) => figure(test.airVoids, site) },
  outcome: { name: 'Result', show: (test) => <ResultCell test={test} /> },
  flags: { name: 'Flags', show: (test) => <FlagsCell flags={test.flags} /> },
  technician: { name: 'Recorded by', head: 'By', show: (test) => test.recordedBy.name },
  recorded: { name: 'Recorded', show: (test, { units }) => units.dateTime(test.recordedAt) },
}

/** The head of a column: what it holds and in which unit. */
export function headOf(key: RegisterKey, site: Site): string {
  const { name, head = name, unit } = REGISTER_COLUMNS[key]
  const mark = unit?.(site) ?? ''
  return mark === '' ? head : `${head}, ${mark}`
}

const helper = createColumnHelper<typeof registerFeatures, RegisterTest>()

/** Every column of the table, for one site's units and names. */
export function tableColumns(site: Site) {
  return helper.columns(
    REGISTER_KEYS.map((key) => {
      const { unit, show } = REGISTER_COLUMNS[key]
      return helper.accessor((test) => show(test, site), { id: key, header: headOf(key, site), cell: ({ getValue }) => getValue(), meta: { numeric: unit !== undefined } })
    }),
  )
}

/** The table's state of columns: those shown from left to right, and all others hidden. */
export function columnState(shown: readonly RegisterKey[]) {
  return { columnOrder: [...shown], columnVisibility: Object.fromEntries(REGISTER_KEYS.map((key) => [key, shown.includes(key)])) }
}
