import type { Lot } from '#shared/schemas/lot.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { sumOf, totalsOf } from './lot-totals.ts'

/** Running totals by zone and material, and of them all. */
export function TotalsTable({ lots }: { lots: readonly Lot[] }) {
  const { site, zone, units } = useSite()
  const totals = totalsOf(lots, site.zones.map(({ id }) => id))
  const all = sumOf(totals)
  const figures = (total: typeof all) => (
    <>
      <Cell numeric>{total.lots}</Cell>
      <Cell numeric>{units.volumeNumber(total.volumeCm3)}</Cell>
      <Cell numeric>{units.volumeNumber(total.spokenCm3)}</Cell>
      <Cell numeric>{total.required}</Cell>
      <Cell numeric>{total.taken}</Cell>
      <Cell numeric>{total.passing}</Cell>
      <Cell numeric className="pr-[26px]">
        {total.owed}
      </Cell>
    </>
  )
  return (
    <Table caption="Totals by zone and material">
      <thead>
        <tr>
          <HeadCell className="pl-4 sm:pl-[26px]">Zone</HeadCell>
          <HeadCell>Material</HeadCell>
          <HeadCell numeric>Lots</HeadCell>
          <HeadCell numeric>Placed, {units.marks.volume}</HeadCell>
          <HeadCell numeric>Spoken for, {units.marks.volume}</HeadCell>
          <HeadCell numeric>Required</HeadCell>
          <HeadCell numeric>Taken</HeadCell>
          <HeadCell numeric>Meet spec</HeadCell>
          <HeadCell numeric className="pr-[26px]">
            Owed
          </HeadCell>
        </tr>
      </thead>
      <tbody>
        {totals.map((total) => (
          <Row key={`${total.zoneId} ${total.materialId}`}>
            <RowHead className="pl-4 sm:pl-[26px]">{zone(total.zoneId)?.name}</RowHead>
            <Cell>{total.materialName}</Cell>
            {figures(total)}
          </Row>
        ))}
      </tbody>
      <tfoot>
        <Row className="font-bold [&>*]:border-t [&>*]:border-t-ink [&>td]:font-bold">
          <RowHead className="pl-4 font-bold sm:pl-[26px]">All of these</RowHead>
          <Cell />
          {figures(all)}
        </Row>
      </tfoot>
    </Table>
  )
}
