import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { Calibration } from '#shared/schemas/calibration.ts'
import { calibrationState } from '#web/components/calibration/calibration-state.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { calibrationQueries } from '#web/data/calibration/queries.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { LabFrame } from '#web/features/lab/lab-frame.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { CalibrationDialog } from './calibration-dialog.tsx'
import { CalibrationSheet } from './calibration-sheet.tsx'
import { CalibrationsTable } from './calibrations-table.tsx'
import { VoidCalibrationDialog } from './void-calibration-dialog.tsx'

/** What field sheets are reduced with: sand, cones, cylinders and balloons, each with its trials. */
export function CalibrationsPage() {
  const { site, can } = useSite()
  const now = useSiteClock(site.id)
  const [adding, setAdding] = useState(false)
  const [opened, setOpened] = useState<Calibration | null>(null)
  const [voiding, setVoiding] = useState<Calibration | null>(null)
  const { data, error, refetch } = useQuery(calibrationQueries.list(site.id))
  const records = can('calibration.record')
  const inUse = data?.filter((each) => calibrationState(each, now()) === 'in-use').length ?? 0
  const add = records && (
    <Button kind="primary" className="pointer-coarse:min-h-11" onClick={() => setAdding(true)}>
      New calibration
    </Button>
  )
  return (
    <LabFrame
      summary={data === undefined ? undefined : `${data.length} ${data.length === 1 ? 'calibration' : 'calibrations'}, ${inUse} in use`}
      actions={data !== undefined && data.length > 0 && add}
      failed={error}
      onRetry={() => void refetch()}
    >
      <div className="px-4 pb-10 sm:px-[26px]">
        {data === undefined ? (
          error === null && <Skeleton label="The calibrations are on their way" lines={[60, 72, 40]} />
        ) : data.length === 0 ? (
          <div className="max-w-[640px]">
            <EmptyState title="No calibration yet" action={add || undefined}>
              Bulk density of the sand, sand in cone and plate, volume of a cylinder, check of a balloon’s indicator: recorded here once, field sheets take their values over and name them.
            </EmptyState>
          </div>
        ) : (
          <CalibrationsTable calibrations={data} now={now()} onOpen={setOpened} onVoid={records ? setVoiding : undefined} />
        )}
      </div>
      {adding && <CalibrationDialog onClose={() => setAdding(false)} />}
      {opened !== null && (
        <CalibrationSheet
          calibration={opened}
          now={now()}
          onVoid={
            records
              ? () => {
                  setVoiding(opened)
                  setOpened(null)
                }
              : undefined
          }
          onClose={() => setOpened(null)}
        />
      )}
      {voiding !== null && <VoidCalibrationDialog calibration={voiding} onClose={() => setVoiding(null)} />}
    </LabFrame>
  )
}
