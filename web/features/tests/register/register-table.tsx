import { useTable } from '@tanstack/react-table'
import { useMemo, type KeyboardEvent } from 'react'
import { Link, useNavigate } from 'react-router-dom'
import { registerKeySchema, type RegisterKey, type RegisterSort, type RegisterTest } from '#shared/schemas/test-register.ts'
import { paths } from '#web/app/paths.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { columnState, registerFeatures, tableColumns } from './register-columns.tsx'
import { SortButton } from './sort-button.tsx'
import './register-table.css'

type RegisterTableProps = {
  tests: readonly RegisterTest[]
  columns: readonly RegisterKey[]
  sort: RegisterSort
  onSort: (sort: RegisterSort) => void
  className?: string
}

/** Arrow keys go from row to row; Enter on a number opens the sheet, as any link. */
function moveByArrow(event: KeyboardEvent<HTMLElement>): void {
  const step = { ArrowDown: 1, ArrowUp: -1 }[event.key]
  const from = event.target instanceof Element ? event.target.closest('tbody a') : null
  if (step === undefined || from === null) return
  const links = [...event.currentTarget.querySelectorAll<HTMLElement>('tbody th a')]
  const to = links[links.findIndex((link) => link === from) + step]
  if (to === undefined) return
  event.preventDefault()
  to.focus()
}

/** The register; the whole row opens the sheet, its number is the link. Head and numbers stay in sight. */
export function RegisterTable({ tests, columns, sort, onSort, className }: RegisterTableProps) {
  const context = useSite()
  const navigate = useNavigate()
  const defs = useMemo(() => tableColumns(context), [context])
  const sorting = [{ id: sort.key, desc: sort.direction === 'desc' }]
  const table = useTable({
    features: registerFeatures,
    data: tests,
    columns: defs,
    getRowId: (test) => test.id,
    manualSorting: true,
    manualPagination: true,
    enableSortingRemoval: false,
    enableMultiSort: false,
    sortDescFirst: false,
    state: { sorting, ...columnState(columns) },
    onSortingChange: (update) => {
      const [next] = typeof update === 'function' ? update(sorting) : update
      const key = registerKeySchema.safeParse(next?.id)
      if (key.success) onSort({ key: key.data, direction: next?.desc === true ? 'desc' : 'asc' })
    },
  })
  const open = (test: RegisterTest): void => void navigate(paths.test(context.site.id, test.id))
  return (
    <div onKeyDown={moveByArrow} className={classNames('flex min-h-0', className)}>
      <Table caption="Field tests" className="register-table w-full overflow-auto">
        <thead>
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map((header) => {
                const sorted = header.column.getIsSorted()
                const numeric = header.column.columnDef.meta?.numeric ?? false
                return (
                  <HeadCell key={header.id} numeric={numeric} aria-sort={sorted === false ? undefined : sorted === 'asc' ? 'ascending' : 'descending'}>
                    <SortButton sorted={sorted} numeric={numeric} onSort={() => header.column.toggleSorting()}>
                      <table.FlexRender header={header} />
                    </SortButton>
                  </HeadCell>
                )
              })}
            </tr>
          ))}
        </thead>
        <tbody>
          {table.getRowModel().rows.map((row) => (
            <Row key={row.id} className="cursor-pointer hover:bg-film" onClick={() => open(row.original)}>
              {row.getVisibleCells().map((cell) =>
                cell.column.id === 'number' ? (
                  <RowHead key={cell.id}>
                    <Link to={paths.test(context.site.id, row.id)} onClick={(event) => event.stopPropagation()} className="text-ink no-underline hover:underline">
                      <table.FlexRender cell={cell} />
                    </Link>
                  </RowHead>
                ) : (
                  <Cell key={cell.id} numeric={cell.column.columnDef.meta?.numeric ?? false} className="whitespace-nowrap">
                    <table.FlexRender cell={cell} />
                  </Cell>
                ),
              )}
            </Row>
          ))}
        </tbody>
      </Table>
    </div>
  )
}
