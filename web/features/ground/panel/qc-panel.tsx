import type { Board } from '#shared/schemas/ground.ts'
import { Figure } from '#web/components/ui/figure.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf, type NotYetGroup } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { DoubtfulSection } from './doubtful-section.tsx'
import { firstStep } from './first-step.ts'
import { LotsShortSection } from './lots-short-section.tsx'
import { NotYetSection } from './not-yet-section.tsx'
import { ReleasesSection } from './releases-section.tsx'
import { StakesList } from './stakes-list.tsx'
import { useLots, useReleases } from './use-panel-data.ts'
import { releasesIn } from './asked-releases.ts'

const of = (board: Board, ...reasons: NotYetGroup['reason'][]): NotYetGroup[] => board.notYet.filter((group) => reasons.includes(group.reason))

/** Whether the frequency is met, where to test next, which results can't be right. */
export function QcPanel({ board }: { board: Board }) {
  const { role } = useSite()
  const { plan } = useGroundView()
  const lots = useLots()
  const asked = releasesIn(useReleases(), 'asked')
  const owed = board.totals.testsOwed
  const short = lots.filter((lot) => lot.owed > 0)
  const nothingPlaced = board.totals.placedCm3 === 0
  return (
    <>
      <PanelSection title="Tests owed">
        <Figure value={owed.toLocaleString('en-US')} unit={owed === 1 ? 'test' : 'tests'} of={nothingPlaced ? 'nothing is placed' : owed === 0 ? 'every lot has its number' : `in ${countOf(short.length, 'lot')}`} />
        {nothingPlaced && <p className="m-0 mt-2 text-ink-2">{firstStep(board, plan, role)}</p>}
        <StakesList />
      </PanelSection>
      <LotsShortSection lots={short} />
      <DoubtfulSection board={board} />
      <NotYetSection title="Rework and retests" groups={of(board, 'rework', 'awaiting-retest')} />
      {role === 'qc-lead' && <ReleasesSection title="Asked for" releases={asked} />}
      <NotYetSection title="Waiting for release" groups={of(board, 'awaiting-release', 'awaiting-acceptance', 'hold', 'recheck')} />
      <NotYetSection title="Foundation to inspect" groups={of(board, 'awaiting-inspection')} />
    </>
  )
}
