import { Link } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { PanelRows } from '#web/components/ui/panel-row.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { newTestLink } from '#web/features/ground/plan/ground-links.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf, type NotYetGroup } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { askedFor } from './asked-releases.ts'
import { GroupRow, ShowButton } from './group-row.tsx'
import { notYetWords } from './not-yet-words.ts'
import { useOrders, useReleases } from './use-panel-data.ts'

/** What this person can do about a group of cells. */
function GroupActs({ group }: { group: NotYetGroup }) {
  const { site, can } = useSite()
  const { start } = useGroundView()
  const asked = askedFor(useReleases(), group)
  switch (group.reason) {
    case 'awaiting-inspection':
      return can('inspection.record') ? (
        <button type="button" onClick={() => start({ kind: 'inspect' }, group.cells)}>
          Record inspection
        </button>
      ) : null
    case 'awaiting-release':
      if (asked !== undefined) {
        return can('release.issue') ? (
          <button type="button" onClick={() => start({ kind: 'review', releaseId: asked.id }, asked.cells.map(({ cell }) => cell))}>
            Review {asked.number}
          </button>
        ) : (
          <span>Release asked for, {asked.number}</span>
        )
      }
      return can('release.issue') || can('release.ask') ? (
        <button type="button" onClick={() => start({ kind: 'release', lift: group.lift }, group.cells)}>
          {can('release.issue') ? 'Release' : 'Ask for release'}
        </button>
      ) : null
    case 'rework':
    case 'awaiting-retest':
      return group.orderId === null ? null : <Link to={paths.reworkOrder(site.id, group.orderId)}>Open {group.orderNumber}</Link>
    case 'suspect':
      return group.testId === null ? null : (
        <>
          <Link to={paths.test(site.id, group.testId)}>Open {group.testNumber}</Link>
          {can('test.record-qc') && <Link to={newTestLink(site.id, { follows: group.testId, kind: 'rerun' })}>Run it again</Link>}
        </>
      )
    default:
      return null
  }
}

function hasActs(group: NotYetGroup, can: ReturnType<typeof useSite>['can']): boolean {
  if (group.reason === 'awaiting-inspection') return can('inspection.record')
  if (group.reason === 'rework' || group.reason === 'awaiting-retest') return group.orderId !== null
  return group.reason === 'awaiting-release' || (group.reason === 'suspect' && can('registers.see'))
}

/** One group of cells and what stands in its way. */
export function NotYetRow({ group }: { group: NotYetGroup }) {
  const { units, can } = useSite()
  const { plan } = useGroundView()
  const orders = useOrders()
  const order = orders.find((each) => each.id === group.orderId)
  const { title, detail, state } = notYetWords(group, plan, units, order)
  return (
    <GroupRow
      mark={<StateSwatch state={state} />}
      title={title}
      detail={detail}
      action={<ShowButton cells={group.cells} of={`${countOf(group.cells.length, 'cell')}: ${title}`} />}
      acts={hasActs(group, can) ? <GroupActs group={group} /> : undefined}
    />
  )
}

/** Why the rest of the ground may not receive fill. */
export function NotYetSection({ title, groups }: { title: string; groups: readonly NotYetGroup[] }) {
  if (groups.length === 0) return null
  return (
    <PanelSection title={title}>
      <PanelRows label={title}>
        {groups.map((group) => (
          <NotYetRow key={[group.reason, group.zoneId, group.lift, group.orderId, group.lotId, group.testId].join(' ')} group={group} />
        ))}
      </PanelRows>
    </PanelSection>
  )
}
