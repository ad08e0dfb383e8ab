import type { ReleaseCheck } from '#shared/schemas/release.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { withoutCells } from '#web/features/ground/plan/cell-choice.ts'
import { countOf } from '#web/features/ground/plan/ground-words.ts'
import { classNames } from '#web/lib/class-names.ts'
import { useUnits } from '#web/lib/site-context.tsx'

type Finding = ReleaseCheck['red'][number]

function FindingRow({ finding, blocks, mayLeaveOut }: { finding: Finding; blocks: boolean; mayLeaveOut: boolean }) {
  const { plan, chosen, choose } = useGroundView()
  return (
    <li className={classNames('border-l-[5px] bg-film px-3 pt-[9px] pb-[7px]', blocks ? 'border-bad' : 'border-warn')}>
      <b className="block font-semibold">
        {blocks ? 'Blocks: ' : 'Note: '}
        {finding.message}
      </b>
      <span className="text-small text-ink-2">{plan.range(finding.cells)}</span>
      {mayLeaveOut && finding.cells.length < chosen.length && (
        <button type="button" className="link-ink ml-3 text-[13px] pointer-coarse:min-h-11" onClick={() => choose(withoutCells(chosen, finding.cells))}>
          Leave {finding.cells.length === 1 ? 'it' : 'them'} out
        </button>
      )}
    </li>
  )
}

/** What stands against a release, and what should be known. */
export function ReleaseChecklist({ check, cells, mayLeaveOut }: { check: ReleaseCheck; cells: number; mayLeaveOut: boolean }) {
  const units = useUnits()
  const clear = check.red.length === 0 && check.amber.length === 0
  return (
    <div role="status" aria-label="Checklist">
      <p className="m-0 font-medium">
        {countOf(cells, 'cell')}, {units.volume(check.volumeCm3)}. {clear ? 'Nothing stands against it.' : ''}
        {check.hold ? ' A hold point: it then waits for the owner’s acceptance.' : ''}
      </p>
      {!clear && (
        <ul className="m-0 mt-2 grid list-none gap-2 p-0">
          {check.red.map((finding) => (
            <FindingRow key={finding.code} finding={finding} blocks mayLeaveOut={mayLeaveOut} />
          ))}
          {check.amber.map((finding) => (
            <FindingRow key={finding.code} finding={finding} blocks={false} mayLeaveOut={mayLeaveOut} />
          ))}
        </ul>
      )}
    </div>
  )
}

export type Standing = 'free' | 'with-reason' | 'blocked'

/** Whether a check lets the release go. */
export function standingOf(check: ReleaseCheck | undefined): Standing {
  if (check === undefined) return 'blocked'
  return check.red.length === 0 ? 'free' : check.overridable ? 'with-reason' : 'blocked'
}
