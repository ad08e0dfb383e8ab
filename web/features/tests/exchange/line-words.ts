import type { PreviewedRow } from '#shared/schemas/test-exchange.ts'
import { METHOD_WORDS } from '#shared/exchange/exchange-words.ts'
import type { Units } from '#web/lib/units.ts'
import type { ImportLine } from './import-lines.ts'

/** Where, when and how a row was tested: "N4, lift 3, Dec 1, 12:00, sand cone"; of one that cannot be read, what it says itself. */
export function placeWords({ row, fields }: ImportLine, previewed: PreviewedRow | undefined, label: (cell: number) => string, units: Units): string {
  if (row === null) return fields.filter((field) => field.trim() !== '').slice(0, 6).join(' · ')
  const { test } = row
  const cell = previewed?.cell ?? null
  const place = cell !== null ? label(cell) : 'cell' in test.place ? test.place.cell : `${units.number(test.place.easting, 1)}, ${units.number(test.place.northing, 1)}`
  return `${place}, lift ${test.lift}, ${units.dateTime(test.sampledAt)}, ${METHOD_WORDS[test.sheet.method].toLowerCase()}`
}

/** What a row would come to: "Meets spec: 97.1 %, 112.3 pcf dry at 13.2 %". */
export function verdictWords({ headline, rc, dryDensity, moisture }: NonNullable<PreviewedRow['verdict']>, units: Units): string {
  return `${headline}: ${units.percent(rc)}, ${units.density(dryDensity)} dry at ${units.percent(moisture)}`
}
