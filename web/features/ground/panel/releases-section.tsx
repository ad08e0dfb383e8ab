import type { Release } from '#shared/schemas/release.ts'
import { PanelRows } from '#web/components/ui/panel-row.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf, liftWords } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { GroupRow, ShowButton } from './group-row.tsx'

function whoWords({ askedBy, issuedBy }: Release): string {
  if (issuedBy !== null) return `released by ${issuedBy.name}`
  return askedBy === null ? '' : `asked by ${askedBy.name}`
}

function ReleaseRow({ release }: { release: Release }) {
  const { units } = useSite()
  const { plan, start } = useGroundView()
  const cells = release.cells.map(({ cell }) => cell)
  const place = `${plan.zone(release.zoneId)?.name ?? ''}, ${liftWords(release.lift)}`
  const detail = [`${countOf(cells.length, 'cell')}, ${units.volume(release.volumeCm3)}`, whoWords(release)].filter((part) => part !== '').join(', ')
  return (
    <GroupRow
      mark={<StateSwatch state="meets-spec" />}
      title={`${release.number} ${place}`}
      detail={release.overrideReason === null ? detail : `${detail}. Frequency short: ${release.overrideReason}`}
      action={<ShowButton cells={cells} of={release.number} />}
      acts={
        <button type="button" aria-label={`Review ${release.number}`} onClick={() => start({ kind: 'review', releaseId: release.id }, cells)}>
          Review
        </button>
      }
    />
  )
}

/** Releases that wait for this person. */
export function ReleasesSection({ title, releases, empty }: { title: string; releases: readonly Release[]; empty?: string }) {
  if (releases.length === 0 && empty === undefined) return null
  return (
    <PanelSection title={title}>
      {releases.length === 0 ? (
        <p className="m-0 mt-1 text-ink-2">{empty}</p>
      ) : (
        <PanelRows label={title}>
          {releases.map((release) => (
            <ReleaseRow key={release.id} release={release} />
          ))}
        </PanelRows>
      )}
    </PanelSection>
  )
}
