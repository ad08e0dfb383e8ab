import type { Board } from '#shared/schemas/ground.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { NotYetSection } from './not-yet-section.tsx'
import { standingInTheWay } from './not-yet-words.ts'
import { firstStep } from './first-step.ts'
import { ReadySection } from './ready-section.tsx'
import { useSite } from '#web/lib/site-context.tsx'

/** Which areas may receive the next lift, and why the rest is not ready. */
export function SuperintendentPanel({ board }: { board: Board }) {
  const { role } = useSite()
  const { plan } = useGroundView()
  return (
    <>
      <ReadySection ready={board.ready} first={firstStep(board, plan, role)} />
      <NotYetSection title="Not yet" groups={standingInTheWay(board.notYet)} />
    </>
  )
}
