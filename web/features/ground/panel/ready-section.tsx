import { Figure } from '#web/components/ui/figure.tsx'
import { PanelRows } from '#web/components/ui/panel-row.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf, liftWords, type ReadyGroup } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { GroupRow, ShowButton } from './group-row.tsx'
import { lastLoadCm3, loadsFor } from './loads.ts'
import { useMaterials, usePlacements } from './use-panel-data.ts'

function ReadyRow({ group }: { group: ReadyGroup }) {
  const { units, can } = useSite()
  const { plan, start } = useGroundView()
  const cells = countOf(group.cells.length, 'cell')
  const place = `${plan.zone(group.zoneId)?.name ?? ''}, ${liftWords(group.lift)}`
  return (
    <GroupRow
      mark={<StateSwatch state="released" />}
      title={place}
      detail={`${cells} to ${units.elevation(group.topUm)}, ${units.thickness(group.thicknessUm)} compacted`}
      action={
        <ShowButton cells={group.cells} of={`the ${cells} of ${place}, ${units.volume(group.cm3)}`}>
          {units.volume(group.cm3)}
        </ShowButton>
      }
      acts={
        can('placement.record') ? (
          <button type="button" aria-label={`Place fill on ${place}`} onClick={() => start({ kind: 'place', lift: group.lift }, group.cells)}>
            Place fill
          </button>
        ) : undefined
      }
    />
  )
}

/** Where the trucks go: what may receive the next lift, how much it takes, in how many loads. */
export function ReadySection({ ready, first }: { ready: readonly ReadyGroup[]; first: string }) {
  const { units } = useSite()
  const load = lastLoadCm3(usePlacements(), useMaterials())
  const cm3 = ready.reduce((sum, group) => sum + group.cm3, 0)
  const cells = ready.reduce((sum, group) => sum + group.cells.length, 0)
  const loads = loadsFor(cm3, load)
  const of = [countOf(cells, 'cell'), loads === null || cells === 0 ? null : `about ${countOf(loads, 'load')}`].filter((part) => part !== null).join(', ')
  return (
    <PanelSection title="May receive the next lift">
      <Figure value={units.volumeNumber(cm3)} unit={units.marks.volume} of={of} />
      {ready.length === 0 ? (
        <p className="m-0 mt-2 text-ink-2">{first}</p>
      ) : (
        <PanelRows label="Ready for the next lift">
          {ready.map((group) => (
            <ReadyRow key={`${group.zoneId} ${group.lift}`} group={group} />
          ))}
        </PanelRows>
      )}
    </PanelSection>
  )
}
