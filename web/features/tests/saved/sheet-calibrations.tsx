import { useQuery } from '@tanstack/react-query'
import type { Calibration } from '#shared/schemas/calibration.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { calibrationWords } from '#web/components/calibration/calibration-words.ts'
import { calibrationQueries } from '#web/data/calibration/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import type { Units } from '#web/lib/units.ts'
import { RowList, SheetSection } from './sheet-section.tsx'

function wordsOf({ sheet, value, performedAt, validUntil, void: voided }: Calibration, units: Units): string {
  const until = validUntil === null ? '' : `, until ${units.fullDate(validUntil)}`
  const since = voided === null ? '' : `; void since ${units.fullDate(voided.at)}: ${voided.reason}`
  return `${calibrationWords(sheet.kind, value, units)}, ${units.fullDate(performedAt)}${until}${since}`
}

/** The calibrations that a sheet's apparatus stood by, each with its value then; what has become of it since is said. */
export function SheetCalibrations({ sheet }: { sheet: TestDetail['sheet'] }) {
  const { site, units } = useSite()
  const ids = 'calibrationIds' in sheet ? (sheet.calibrationIds ?? []) : []
  const { data, error } = useQuery({ ...calibrationQueries.list(site.id), enabled: ids.length > 0 })
  if (ids.length === 0) return null
  const rows = ids.map((id) => data?.find((each) => each.id === id)).filter((each) => each !== undefined)
  return (
    <SheetSection title="Calibrations" aside="used by this sheet">
      {data === undefined ? (
        <p className="m-0 text-ink-2">{error === null ? `${ids.length} named; on their way.` : `${ids.length} named, which could not be read now. The sheet carries their values.`}</p>
      ) : (
        <RowList rows={rows.map((each) => ({ label: each.apparatus, value: wordsOf(each, units) }))} />
      )}
    </SheetSection>
  )
}
