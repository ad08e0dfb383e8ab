import type { GroundState } from '#shared/domain/ground-state.ts'
import type { Board } from '#shared/schemas/ground.ts'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { cellRangeWords } from '#web/lib/cell-range.ts'
import { useSite } from '#web/lib/site-context.tsx'

export type KeepOffGroup = Board['notYet'][number]

const WORDS: Partial<Record<KeepOffGroup['reason'], readonly [state: GroundState, words: string]>> = {
  rework: ['rework', 'Somebody else’s rework'],
  'awaiting-retest': ['awaiting-retest', 'Rework done, waits for its retest'],
  suspect: ['suspect', 'Result can’t be right, to be run again'],
  'awaiting-test': ['awaiting-test', 'Placed, waits for a test'],
  'awaiting-release': ['meets-spec', 'Tests met, waits for release'],
  'awaiting-acceptance': ['meets-spec', 'Waits for the owner’s acceptance'],
  hold: ['released', 'On hold, a verification test fails'],
  recheck: ['recheck', 'To be looked at again after rain or freeze'],
  'awaiting-inspection': ['awaiting-test', 'Foundation waits for inspection'],
  partial: ['awaiting-test', 'Only partly placed'],
}

/** Ground to keep off: what waits for somebody, and rework that is another's. */
export function keepOffGroups(board: Board, mine: ReadonlySet<string>): KeepOffGroup[] {
  return board.notYet.filter((group) => group.reason in WORDS && !(group.reason === 'rework' && group.orderId !== null && mine.has(group.orderId)))
}

function Line({ state, title, place, cells, figure }: { state: GroundState; title: string; place: string; cells: readonly number[]; figure?: string }) {
  const { lookup } = useSite()
  return (
    <li className="grid grid-cols-[auto_1fr_auto] items-start gap-3 border-t border-rule py-3">
      <StateSwatch state={state} size={34} />
      <span className="min-w-0">
        <b className="block text-[17px] leading-[1.25] font-semibold">{title}</b>
        <span className="block text-[14px] text-ink-2">{place}</span>
        <span className="block text-[15px] font-medium break-words">{cellRangeWords(lookup, cells)}</span>
      </span>
      {figure !== undefined && <span className="num pt-[2px] text-[16px] whitespace-nowrap">{figure}</span>}
    </li>
  )
}

const cellsWords = (count: number): string => `${count} ${count === 1 ? 'cell' : 'cells'}`

export function KeepOffList({ groups }: { groups: readonly KeepOffGroup[] }) {
  const { zone } = useSite()
  if (groups.length === 0) return <p className="m-0 py-4 text-[16px] text-ink-2">Nothing to keep off now. Stay on the haul routes all the same.</p>
  return (
    <ul aria-label="Keep off" className="m-0 list-none p-0">
      {groups.map((group) => {
        const [state, words] = WORDS[group.reason] ?? ['awaiting-test', group.reason]
        const name = group.orderNumber === null ? words : `${words}, ${group.orderNumber}`
        return (
          <Line
            key={[group.reason, group.zoneId, group.lift, group.orderId, group.lotId, group.testId].join(' ')}
            state={state}
            title={name}
            place={`${zone(group.zoneId)?.name ?? ''}, ${group.lift === 0 ? 'foundation' : `lift ${group.lift}`}`}
            cells={group.cells}
            figure={cellsWords(group.cells.length)}
          />
        )
      })}
    </ul>
  )
}

export function ReadyList({ groups }: { groups: Board['ready'] }) {
  const { zone, units } = useSite()
  if (groups.length === 0) return <p className="m-0 py-4 text-[16px] text-ink-2">No ground may take the next lift now.</p>
  return (
    <ul aria-label="Ready for the next lift" className="m-0 list-none p-0">
      {groups.map((group) => (
        <Line
          key={`${group.zoneId} ${group.lift}`}
          state="released"
          title={`${zone(group.zoneId)?.name ?? ''}, lift ${group.lift} may be placed`}
          place={`${cellsWords(group.cells.length)}, ${units.thickness(group.thicknessUm)} compacted`}
          cells={group.cells}
          figure={units.volume(group.cm3)}
        />
      ))}
    </ul>
  )
}
