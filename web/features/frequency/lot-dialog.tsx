import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import type { TestSummary } from '#shared/schemas/field-test.ts'
import type { Lot, Stake } from '#shared/schemas/lot.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { paths } from '#web/app/paths.ts'
import { LotBlocks } from '#web/components/drawing/lot-blocks.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { FactsRow } from '#web/components/ui/figure.tsx'
import { PanelRow, PanelRows } from '#web/components/ui/panel-row.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { StakeFlag } from '#web/components/ui/stake-flag.tsx'
import { TestMark, type TestOutcome } from '#web/components/ui/test-mark.tsx'
import { testQueries } from '#web/data/test/queries.ts'
import { cellRangeWords } from '#web/lib/cell-range.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { blocksOf, standingWords } from './lot-words.ts'

function outcomeOf({ outcome, near }: TestSummary): TestOutcome {
  if (outcome === 'pass') return near ? 'near' : 'passes'
  return outcome === 'fail' ? 'fails' : 'suspect'
}

function testNote(test: TestSummary): string {
  if (test.voided) return ', void'
  if (test.superseded) return ', out of force since rework'
  return test.current ? '' : ', followed by a later test'
}

/** One lot: what it holds, its tests, its stakes. */
export function LotDialog({ lot, orders, stakes, onClose }: { lot: Lot; orders: readonly Order[]; stakes: readonly Stake[]; onClose: () => void }) {
  const { site, lookup, label, zone, units } = useSite()
  const tests = useQuery(testQueries.list(site.id, { lotId: lot.id, limit: 500 }))
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => !open && onClose()}
      title={lot.name}
      description={`${zone(lot.zoneId)?.name ?? ''}, lift ${lot.lift}, ${lot.materialName}. ${standingWords(lot, orders, units).text}.`}
      actions={
        <DialogClose>
          <Button>Close</Button>
        </DialogClose>
      }
    >
      <LotBlocks label={lot.name} blocks={blocksOf(lot)} />
      <FactsRow
        className="mt-3"
        facts={[
          { label: 'Placed', value: units.volume(lot.volumeCm3) },
          { label: 'Spoken for', value: units.volume(lot.spokenCm3) },
          { label: 'One test speaks for', value: units.volume(lot.fCm3) },
          { label: 'Tests taken', value: `${lot.taken} of ${lot.required}` },
        ]}
      />
      <p className="mt-3 mb-0">
        Cells {cellRangeWords(lookup, lot.cells)}. Specification version {lot.specificationVersion}, as it stood when the lot began.
      </p>
      {orders.map((order) => (
        <p key={order.id} className="mt-2 mb-0">
          <Link to={paths.reworkOrder(site.id, order.id)} className="link-ink">
            {order.number}
          </Link>
          , {order.headline}
        </p>
      ))}
      {stakes.length > 0 && (
        <PanelRows label="Stakes of this lot">
          {stakes.map((stake) => (
            <PanelRow key={stake.id} mark={<StakeFlag label={stake.label} />} title={`Cell ${label(stake.cell)}`} detail={`drawn ${units.dateTime(stake.drawnAt)} by ${stake.drawnBy}`} />
          ))}
        </PanelRows>
      )}
      {tests.data === undefined ? (
        <div className="mt-4">
          <Skeleton label="The lot’s tests are on their way" />
        </div>
      ) : (
        <PanelRows label="Tests of this lot">
          {tests.data.tests.length === 0 && <li className="border-t border-rule py-[9px] text-ink-2">No test was taken in this lot yet.</li>}
          {tests.data.tests.map((test) => (
            <PanelRow
              key={test.id}
              mark={<TestMark outcome={outcomeOf(test)} verification={test.purpose === 'verification'} />}
              title={
                <Link to={paths.test(site.id, test.id)} className="link-ink">
                  {test.number}
                </Link>
              }
              detail={`Cell ${label(test.cell)}, ${units.dateTime(test.sampledAt)}, ${test.headline}${testNote(test)}`}
              action={<span className="num">{units.percent(test.rc)}</span>}
            />
          ))}
        </PanelRows>
      )}
    </Dialog>
  )
}
