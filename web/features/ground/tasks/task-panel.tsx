import type { GroundSheet } from '#shared/ground-codec.ts'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import type { GroundTask } from '#web/features/ground/plan/ground-task.ts'
import { AcceptAsIs } from './accept-as-is.tsx'
import { Inspection } from './inspection.tsx'
import { PlaceFill } from './place/place-fill.tsx'
import { ReleaseCells } from './release/release-cells.tsx'
import { ReviewRelease } from './release/review-release.tsx'
import { ReworkOrder } from './rework-order.tsx'

/** The task in the panel. Placing reads the working surface whatever cut is shown. */
export function TaskPanel({ task, surface }: { task: GroundTask; surface: GroundSheet | undefined }) {
  switch (task.kind) {
    case 'place':
      return surface === undefined ? (
        <div className="p-[22px]">
          <Skeleton label="The sheet is on its way" />
        </div>
      ) : (
        <PlaceFill surface={surface} lift={task.lift} />
      )
    case 'inspect':
      return <Inspection />
    case 'release':
      return <ReleaseCells lift={task.lift} />
    case 'review':
      return <ReviewRelease releaseId={task.releaseId} />
    case 'accept-as-is':
      return <AcceptAsIs lift={task.lift} />
    case 'rework':
      return <ReworkOrder lift={task.lift} />
  }
}
