import { Link } from 'react-router-dom'
import { useQuery } from '@tanstack/react-query'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { paths } from '#web/app/paths.ts'
import { orderQueries } from '#web/data/order/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { cellsWords } from '#web/features/tests/cells-words.ts'
import { countOf, PURPOSE_WORDS } from '#web/features/tests/outcome-words.ts'
import { RowList, SheetSection } from './sheet-section.tsx'

/** Where it was taken, by whom and when. */
export function TestPlace({ test }: { test: TestDetail }) {
  const { site, units, label, zone } = useSite()
  const unit = site.grid.unit === 'm' ? 'm' : 'ft'
  const rows = [
    { label: 'Cell', value: <Link className="link-ink font-sans" to={`${paths.ground(site.id)}?cell=${label(test.cell)}`}>{label(test.cell)}</Link> },
    { label: 'Zone and lift', value: <span className="font-sans">{`${zone(test.zoneId)?.name ?? ''}, lift ${test.lift}`}</span> },
    { label: 'Easting', value: `${units.number(test.easting, 2)}\u2009${unit}` },
    { label: 'Northing', value: `${units.number(test.northing, 2)}\u2009${unit}` },
    ...(test.stakeLabel === null ? [] : [{ label: 'Stake', value: test.stakeLabel }]),
    ...(test.surfaceUm === null ? [] : [{ label: 'Ground elevation', value: units.elevation(test.surfaceUm) }]),
    { label: 'Depth below surface', value: units.thickness(test.depthUm) },
    { label: 'Sampled', value: `${units.fullDate(test.sampledAt)}, ${units.time(test.sampledAt)}` },
    { label: 'Recorded', value: `${units.fullDate(test.recordedAt)}, ${units.time(test.recordedAt)}` },
    { label: 'By', value: <span className="font-sans">{test.recordedBy.name}</span> },
  ]
  return (
    <SheetSection title="Place and time" aside={`${PURPOSE_WORDS[test.purpose].name} test`}>
      <RowList rows={rows} />
    </SheetSection>
  )
}

const MARK_WORDS = { fail: 'Marked for rework', suspect: 'In doubt until run again', hold: 'On hold' } as const

/** What the test speaks for now, what it marked, and the order it stands under. */
export function TestReach({ test }: { test: TestDetail }) {
  const { site, units, lookup } = useSite()
  const order = useQuery({ ...orderQueries.detail(site.id, test.orderId ?? ''), enabled: test.orderId !== null }).data
  const volume = test.speaksFor.reduce((sum, share) => sum + share.cm3, 0)
  const rows = [
    {
      label: 'Speaks for',
      value: volume === 0 ? 'nothing' : `${units.volume(volume)}, ${countOf(test.speaksFor.length, 'cell')}`,
    },
    ...(volume === 0 ? [] : [{ label: 'In', value: cellsWords(test.speaksFor.map((share) => share.cell), lookup) }]),
    ...test.marks.map(({ kind, cells }) => ({ label: MARK_WORDS[kind], value: cellsWords(cells, lookup) })),
    ...(test.orderId === null ? [] : [{ label: 'Rework order', value: <Link className="link-ink" to={paths.reworkOrder(site.id, test.orderId)}>{order?.number ?? 'Open it'}</Link> }]),
  ]
  return (
    <SheetSection title="What it does to the ground">
      <RowList rows={rows.map((row) => ({ ...row, value: <span className="font-sans">{row.value}</span> }))} />
    </SheetSection>
  )
}
