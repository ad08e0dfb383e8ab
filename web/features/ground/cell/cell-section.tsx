import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import type { Column } from '#shared/schemas/ground.ts'
import { paths } from '#web/app/paths.ts'
import { AcceptanceWindow } from '#web/components/drawing/acceptance-window.tsx'
import { StripLog } from '#web/components/drawing/strip-log.tsx'
import { Banner } from '#web/components/ui/banner.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { columnQueries } from '#web/data/column/queries.ts'
import { curveQueries } from '#web/data/curve/queries.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { CellActions } from './cell-actions.tsx'
import { cellPlot, curveInForce } from './cell-plot.ts'
import { logWords, loggedRows, stateWord, whyLine } from './strip-rows.ts'

function CellLog({ column }: { column: Column }) {
  const { site, units, can, label } = useSite()
  const rows = loggedRows(column).map((row) => {
    const { title, note } = logWords(row, units)
    const test = can('registers.see') ? row.test : null
    return {
      lift: row.lift,
      state: row.state,
      flags: row.flags,
      word: stateWord(row.state, row.lift),
      title: test !== null ? (
        <Link to={paths.test(site.id, test.id)} aria-label={`${title}, open ${test.number}`} className="text-inherit no-underline after:absolute after:inset-0 hover:underline">
          {title}
        </Link>
      ) : (
        title
      ),
      note,
    }
  })
  return <StripLog label={`Lifts of cell ${label(column.cell)}`} rows={rows} />
}

function CellPlot({ column }: { column: Column }) {
  const { site, units, can, zone, label } = useSite()
  const curves = useQuery({ ...curveQueries.list(site.id), enabled: can('registers.see') }).data ?? []
  const criteria = zone(column.zoneId ?? '')?.specification.criteria ?? []
  const plot = cellPlot(column, curveInForce(column, curves), criteria, units.system, site.waterDensity)
  if (plot === null) return null
  const count = plot.tests.length
  return <AcceptanceWindow {...plot} label={`${count === 1 ? '1 result' : `${count} results`} of cell ${label(column.cell)} in the acceptance window`} />
}

function CellBody({ column }: { column: Column }) {
  return (
    <>
      <p className="m-0 mt-1 font-medium">{whyLine(column)}</p>
      {column.zoneId !== null && (
        <div className="mt-3 grid grid-cols-[minmax(150px,1fr)_minmax(0,176px)] gap-4">
          <CellLog column={column} />
          <CellPlot column={column} />
        </div>
      )}
      <CellActions column={column} />
    </>
  )
}

/** One cell: its lifts as a boring log, its results in the window, why it stands as it does, what to do. */
export function CellSection({ cell }: { cell: number }) {
  const { site, label, zoneOfCell, units } = useSite()
  const { go } = useGroundView()
  const column = useQuery(columnQueries.detail(site.id, cell))
  const side = units.number(site.grid.cellSize, Number.isInteger(site.grid.cellSize) ? 0 : 1)
  const size = `${side} × ${side} ${site.grid.unit === 'm' ? 'm' : 'ft'}`
  return (
    <section aria-labelledby="cell-heading" className="px-[22px] py-[18px]">
      <div className="flex items-baseline gap-2">
        <h2 id="cell-heading" tabIndex={-1} className="m-0 min-w-0 flex-1 text-head font-bold">
          Cell {label(cell)} <span className="font-medium text-ink-2">{[zoneOfCell(cell)?.name, size].filter((part) => part !== undefined).join(', ')}</span>
        </h2>
        <button type="button" aria-label={`Close cell ${label(cell)}`} className="link-ink text-[13px] pointer-coarse:min-h-11" onClick={() => go({ cell: undefined })}>
          Close
        </button>
      </div>
      {column.data !== undefined ? (
        <CellBody column={column.data} />
      ) : column.isError ? (
        <Banner tone="bad" title="The cell cannot be read." className="mt-2" action={<button type="button" onClick={() => void column.refetch()}>Try again</button>}>
          {column.error.message}
        </Banner>
      ) : (
        <div className="mt-3">
          <Skeleton label="The cell is on its way" lines={[60, 80, 80, 80]} />
        </div>
      )}
    </section>
  )
}
