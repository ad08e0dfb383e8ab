import { VOLUME_DIFFERENCE_LIMIT_PERCENT, type PlacementVolumeResult } from '#shared/domain/placement-volume.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { FactsRow } from '#web/components/ui/figure.tsx'
import { NO_VALUE, TRUE_MINUS } from '#shared/units/format.ts'
import { useUnits } from '#web/lib/site-context.tsx'

function signed(percent: number): string {
  const size = Math.abs(percent).toFixed(1)
  return percent === 0 ? size : `${percent > 0 ? '+' : TRUE_MINUS}${size}`
}

/** The placement's compacted volume both ways, their difference, and which one counts. */
export function VolumeFacts({ volume }: { volume: PlacementVolumeResult | null }) {
  const units = useUnits()
  if (volume === null) return null
  if (!volume.ok) return <p className="m-0 text-small font-medium text-bad">{volume.reason}</p>
  const { geometryCm3, loadsCm3, drivingCm3, drivenBy, differencePercent, flagged } = volume
  const facts = [
    { label: 'Cells hold', value: units.volumeNumber(geometryCm3), unit: units.marks.volume },
    { label: 'Loads give', value: loadsCm3 === undefined ? NO_VALUE : units.volumeNumber(loadsCm3), unit: loadsCm3 === undefined ? '' : units.marks.volume },
    { label: 'Difference', value: differencePercent === undefined ? NO_VALUE : signed(differencePercent), unit: differencePercent === undefined ? '' : '%', tone: flagged ? ('bad' as const) : undefined },
  ]
  return (
    <div role="group" aria-label="Compacted volume">
      <FactsRow facts={facts} columns={3} />
      <p className="m-0 mt-2 text-small text-ink-2">
        {units.volume(drivingCm3)} compacted counts, {drivenBy === 'loads' ? 'from the loads' : 'from area and thickness'}.
      </p>
      {flagged && (
        <Banner tone="off" title={`The two differ by more than ${VOLUME_DIFFERENCE_LIMIT_PERCENT} %.`} className="mt-2">
          Check the cells and the loads. It may be saved, and goes to the exceptions.
        </Banner>
      )}
    </div>
  )
}
