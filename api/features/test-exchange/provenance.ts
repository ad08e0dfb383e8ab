import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { PROVENANCE, PROVENANCE_TITLE } from '#shared/exchange/csv-cell.ts'
import { writeSiteTime } from '#shared/exchange/site-time.ts'
import type { ExportUnits, TestExport } from '#shared/schemas/test-exchange.ts'

const UNIT_WORDS: Readonly<Record<ExportUnits, string>> = {
  'as-entered': 'readings as they were entered, each sheet’s units in columns beside; this form can be read in again unchanged',
  us: 'readings converted to lb, pcf, ft³ and in, seven digits, for reading',
  si: 'readings converted to g, kg/m³, cm³ and mm, seven digits, for reading',
}
/** Parts of the address that say how the file looks, not what is in it. */
const FORM: readonly string[] = ['format', 'units', 'bom', 'offset', 'limit', 'sort', 'direction']

export interface Provenance {
  readonly plan: SitePlan
  readonly by: string
  readonly now: Date
  readonly tests: number
  readonly query: TestExport
}

/** Where a file comes from, line by line: what it is about and what it says. */
export function provenanceOf({ plan: { site }, by, now, tests, query }: Provenance): (readonly [string, string])[] {
  const filter = Object.entries(query).filter(([name, value]) => !FORM.includes(name) && value !== undefined)
  return [
    ['Site', site.name],
    ['Coordinates', `${site.crsCode}, ${site.grid.unit}; elevations on ${site.verticalDatum || 'the site’s datum'}`],
    ['Exported', `${writeSiteTime(now.toISOString(), site.timeZone)} by ${by}`],
    ['Units', UNIT_WORDS[query.units]],
    ['Filter', filter.length === 0 ? 'all tests' : filter.map(([name, value]) => `${name} ${String(value)}`).join(', ')],
    ['Tests', String(tests)],
    ['Reading in again', 'results, technician, zone and number are for reading; the register that reads the file judges and numbers anew'],
  ]
}

/** The same as lines at the head of a CSV file. */
export function provenanceHead(provenance: Provenance): string[] {
  return [PROVENANCE_TITLE, ...provenanceOf(provenance).map(([about, words]) => `${PROVENANCE}${about}: ${words.replace(/\s+/g, ' ')}`)]
}

/** A name for the file: the site's and the day's. */
export function fileNameOf({ plan: { site }, now, query }: Provenance): string {
  const name = site.name.replace(/[^\p{L}\p{N}]+/gu, '-').replace(/^-|-$/g, '').toLowerCase()
  return `${name || 'site'}-tests-${writeSiteTime(now.toISOString(), site.timeZone).slice(0, 10)}.${query.format}`
}
