import { useQuery } from '@tanstack/react-query'
import { useMemo, useState } from 'react'
import { hasFlag, GROUND_STATES } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { testQueries } from '#web/data/test/queries.ts'
import { useBoard, useLots } from '#web/features/ground/panel/use-panel-data.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf } from '#web/features/ground/plan/ground-words.ts'
import { CURRENT_TESTS } from '#web/features/ground/sheet/shown-marks.ts'
import { useSite, useUnits } from '#web/lib/site-context.tsx'
import { ListFilters } from './list-filters.tsx'
import { filterRows, listRows, type ListFilter, type ListRow } from './list-rows.ts'

const PAGE = 200
const ALL: ListFilter = { zoneId: '', state: '', text: '' }

function CellRow({ row }: { row: ListRow }) {
  const units = useUnits()
  const { address, go } = useGroundView()
  return (
    <Row selected={address.cell === row.cell}>
      <RowHead>
        <button type="button" className="link-ink min-h-8 pointer-coarse:min-h-12" onClick={() => go({ cell: row.cell })}>
          {row.label}
        </button>
      </RowHead>
      <Cell className="whitespace-nowrap">{row.zone}</Cell>
      <Cell numeric>{row.lift === 0 ? 'foundation' : row.lift}</Cell>
      <Cell>
        <span className="flex items-center gap-2">
          <StateSwatch state={row.state} near={hasFlag(row.flags, 'near')} covered={hasFlag(row.flags, 'covered')} size={17} />
          {row.stands}
        </span>
      </Cell>
      <Cell className="whitespace-nowrap">{row.lot}</Cell>
      <Cell className="whitespace-nowrap">{row.test}</Cell>
      <Cell numeric>{row.volumeCm3 === null ? '' : units.volumeNumber(row.volumeCm3)}</Cell>
      <Cell numeric>{units.elevationNumber(row.topUm)}</Cell>
      <Cell>{row.next}</Cell>
    </Row>
  )
}

function ListTable({ rows, caption }: { rows: readonly ListRow[]; caption: string }) {
  const { marks } = useUnits()
  return (
    <Table caption={caption}>
      <thead>
        <tr>
          <HeadCell>Cell</HeadCell>
          <HeadCell>Zone</HeadCell>
          <HeadCell numeric>Lift</HeadCell>
          <HeadCell>State</HeadCell>
          <HeadCell>Lot</HeadCell>
          <HeadCell>Named by</HeadCell>
          <HeadCell numeric>Volume {marks.volume}</HeadCell>
          <HeadCell numeric>Top {marks.elevation}</HeadCell>
          <HeadCell>Next lift</HeadCell>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <CellRow key={row.cell} row={row} />
        ))}
      </tbody>
    </Table>
  )
}

/** Everything the map says, as a table: for those who cannot see the map and those who would rather read. */
export function ListView({ sheet, showing }: { sheet: GroundSheet; showing: string }) {
  const { site, units, can } = useSite()
  const { plan } = useGroundView()
  const board = useBoard().data
  const lots = useLots()
  const tests = useQuery({ ...testQueries.list(site.id, CURRENT_TESTS), enabled: can('registers.see') }).data
  const [filter, setFilter] = useState(ALL)
  const [page, setPage] = useState(0)
  const rows = useMemo(() => listRows({ plan, sheet, board, lots, tests: tests?.tests ?? [], units }), [plan, sheet, board, lots, tests, units])
  const kept = useMemo(() => filterRows(rows, filter), [rows, filter])
  const states = GROUND_STATES.filter((state) => rows.some((row) => row.state === state))
  const pages = Math.max(1, Math.ceil(kept.length / PAGE))
  const at = Math.min(page, pages - 1)
  return (
    <section aria-label="List of cells" className="h-full overflow-y-auto bg-sheet px-4 py-4 sm:px-[22px]">
      <ListFilters
        filter={filter}
        states={states}
        onChange={(next) => {
          setFilter(next)
          setPage(0)
        }}
      />
      <p role="status" className="mt-3 mb-2 font-medium">
        {countOf(kept.length, 'cell')} of {rows.length.toLocaleString('en-US')}, {showing}
      </p>
      {kept.length === 0 ? (
        <EmptyState title="No cell is like that" action={<Button onClick={() => setFilter(ALL)}>Show all cells</Button>}>
          Take something out of the filter.
        </EmptyState>
      ) : (
        <ListTable rows={kept.slice(at * PAGE, (at + 1) * PAGE)} caption={`Cells, ${showing}`} />
      )}
      {pages > 1 && (
        <div className="mt-3 flex flex-wrap items-center gap-3">
          <Button disabled={at === 0} onClick={() => setPage(at - 1)}>
            Before
          </Button>
          <span>
            Page {at + 1} of {pages}
          </span>
          <Button disabled={at === pages - 1} onClick={() => setPage(at + 1)}>
            Next
          </Button>
        </div>
      )}
    </section>
  )
}
