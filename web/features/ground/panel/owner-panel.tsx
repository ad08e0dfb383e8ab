import { Link } from 'react-router-dom'
import type { Board } from '#shared/schemas/ground.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Figure } from '#web/components/ui/figure.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { newTestLink } from '#web/features/ground/plan/ground-links.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { releasesIn } from './asked-releases.ts'
import { ExceptionsSection } from './exceptions-section.tsx'
import { filledShare } from './filled-share.ts'
import { firstStep } from './first-step.ts'
import { ReleasesSection } from './releases-section.tsx'
import { useReleases } from './use-panel-data.ts'
import { ZoneProgress } from './zone-progress.tsx'

function VerificationSection({ verification }: { verification: Board['verification'] }) {
  const { site, can } = useSite()
  const { tests, failing } = verification
  return (
    <PanelSection title="Verification tests" aside={countOf(tests, 'test')}>
      <p className="m-0 mt-1 mb-3 text-ink-2">
        {tests === 0 ? 'None recorded yet.' : failing === 0 ? 'None of them fails.' : `${countOf(failing, 'test')} of ${tests} ${failing === 1 ? 'fails' : 'fail'}. Cells there are on hold.`}
      </p>
      {can('test.record-qa') && (
        <Link to={newTestLink(site.id)} className={buttonClasses('plain')}>
          Record verification test
        </Link>
      )}
    </PanelSection>
  )
}

/** How far the fill has come, what waits for acceptance, what is out of the ordinary. */
export function OwnerPanel({ board }: { board: Board }) {
  const { units, role } = useSite()
  const { plan } = useGroundView()
  const waiting = releasesIn(useReleases(), 'awaiting-acceptance')
  const placed = board.zones.reduce((sum, zone) => sum + zone.placedCm3, 0)
  const design = board.zones.reduce((sum, zone) => sum + zone.designCm3, 0)
  return (
    <>
      <PanelSection title="Filled to grade">
        <Figure value={units.number(filledShare(placed, design), 1)} unit="%" of={`${units.volumeNumber(placed)} of ${units.volume(design)}`} />
        {board.totals.placedCm3 === 0 && <p className="m-0 mt-2 text-ink-2">{firstStep(board, plan, role)}</p>}
        <ZoneProgress zones={board.zones} />
      </PanelSection>
      <ReleasesSection title="Waiting for you" releases={waiting} empty="No hold point waits for your acceptance." />
      <ExceptionsSection exceptions={board.exceptions} />
      <VerificationSection verification={board.verification} />
    </>
  )
}
