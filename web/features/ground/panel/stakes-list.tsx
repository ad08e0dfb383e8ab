import { Link } from 'react-router-dom'
import { PanelRow, PanelRows } from '#web/components/ui/panel-row.tsx'
import { StakeFlag } from '#web/components/ui/stake-flag.tsx'
import { newTestLink } from '#web/features/ground/plan/ground-links.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { useStakes } from './use-panel-data.ts'

/** Where to test next: the stakes that stand, each with its place and the way to its record. */
export function StakesList() {
  const { site, label, units, can } = useSite()
  const { plan } = useGroundView()
  const stakes = useStakes()
  if (stakes.length === 0) return null
  return (
    <PanelRows label="Stakes to go to">
      {stakes.map((stake) => (
        <PanelRow
          key={stake.id}
          mark={<StakeFlag label={stake.label} />}
          title={`Cell ${label(stake.cell)}, ${plan.zone(stake.zoneId)?.shortName ?? ''} lift ${stake.lift}`}
          detail={`E ${units.number(stake.easting, 1)} N ${units.number(stake.northing, 1)}`}
          action={
            can('test.record-qc') ? (
              <Link to={newTestLink(site.id, { stake: stake.id })} aria-label={`Record the test at ${stake.label}`} className="inline-flex items-start pointer-coarse:min-h-11">
                Record
              </Link>
            ) : undefined
          }
        />
      ))}
    </PanelRows>
  )
}
