import { memo, useMemo, useState } from 'react'
import type { Lot } from '#shared/schemas/lot.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { LotBlocks } from '#web/components/drawing/lot-blocks.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import type { Units } from '#web/lib/units.ts'
import { DrawStakesButton } from './draw-stakes-button.tsx'
import { stakesToDraw } from '#web/data/lot/stakes-to-draw.ts'
import { blocksOf, standingWords, TONE_CLASS } from './lot-words.ts'

/** So many rows stand at once; the rest follow on request, so that a long job's register stays quick. */
const AT_ONCE = 100
/** Room for the longest lot's bar, px, and a full block at most; one scale for all, so that lots compare. */
const BAR = 440
const LARGEST_BLOCK = 72
const STACKED = 'max-md:inline-block max-md:border-0 max-md:px-0 max-md:py-[2px] max-md:mr-4'

type RegisterProps = {
  lots: readonly Lot[]
  ordersOf: ReadonlyMap<string, readonly Order[]>
  blockHead: string
  units: Units
  mayDraw: boolean
  onOpen: (lot: Lot) => void
}

type LotRowProps = { lot: Lot; blockWidth: number; orders: readonly Order[]; units: Units; mayDraw: boolean; onOpen: (lot: Lot) => void }

const Short = ({ children }: { children: string }) => <span className="mr-1 font-sans text-small text-ink-2 md:hidden">{children}</span>

const LotRow = memo(function LotRow({ lot, blockWidth, orders, units, mayDraw, onOpen }: LotRowProps) {
  const { text, tone } = standingWords(lot, orders, units)
  return (
    <Row className="max-md:block max-md:border-b max-md:border-rule max-md:px-4 max-md:py-3">
      <RowHead className={`${STACKED} md:pl-[26px]`}>
        <button type="button" onClick={() => onOpen(lot)} className="text-left font-semibold underline decoration-rule-2 underline-offset-3 hover:decoration-ink pointer-coarse:min-h-11">
          {lot.name}
        </button>
      </RowHead>
      <Cell className={`${STACKED} whitespace-nowrap`}>{lot.materialName}</Cell>
      <Cell numeric className={STACKED}>
        <Short>Placed</Short>
        {units.volumeNumber(lot.volumeCm3)}
        <span className="md:hidden"> {units.marks.volume}</span>
      </Cell>
      <Cell className="max-md:block max-md:overflow-hidden max-md:border-0 max-md:px-0 max-md:py-1">
        <LotBlocks label={lot.name} blocks={blocksOf(lot)} blockWidth={blockWidth} maxWidth={BAR} />
      </Cell>
      <Cell numeric className={STACKED}>
        <Short>Required</Short>
        {lot.required}
      </Cell>
      <Cell numeric className={STACKED}>
        <Short>Taken</Short>
        {lot.taken}
      </Cell>
      <Cell numeric className={STACKED}>
        <Short>Meet spec</Short>
        {lot.passing}
      </Cell>
      <Cell className="max-md:block max-md:border-0 max-md:px-0 max-md:py-1 md:pr-[26px]">
        <span className="flex flex-wrap items-center gap-x-3 gap-y-1">
          <span className={`${TONE_CLASS[tone]} md:whitespace-nowrap`}>{text}</span>
          {mayDraw && stakesToDraw(lot) > 0 && <DrawStakesButton lot={lot} />}
        </span>
      </Cell>
    </Row>
  )
})

function blockWidthFor(lots: readonly Lot[]): number {
  const longest = Math.max(1, ...lots.map((lot) => blocksOf(lot).reduce((sum, block) => sum + block.share, 0)))
  const most = Math.max(1, ...lots.map((lot) => lot.blocks.length))
  return Math.min(LARGEST_BLOCK, Math.max(4, (BAR - 2 - 2 * most) / longest))
}

const NONE: readonly Order[] = []

/** Every lot as blocks of one test's volume, with what it needs, has and where it stands. */
export function LotRegister({ lots, ordersOf, blockHead, units, mayDraw, onOpen }: RegisterProps) {
  const [shown, setShown] = useState(AT_ONCE)
  const blockWidth = useMemo(() => blockWidthFor(lots), [lots])
  return (
    <>
      <Table caption="Register of lots">
        <thead className="max-md:sr-only">
          <tr>
            <HeadCell className="pl-[26px]">Lot</HeadCell>
            <HeadCell>Material</HeadCell>
            <HeadCell numeric>Placed, {units.marks.volume}</HeadCell>
            <HeadCell>{blockHead}</HeadCell>
            <HeadCell numeric>Required</HeadCell>
            <HeadCell numeric>Taken</HeadCell>
            <HeadCell numeric>Meet spec</HeadCell>
            <HeadCell className="pr-[26px]">Standing</HeadCell>
          </tr>
        </thead>
        <tbody className="max-md:block">
          {lots.slice(0, shown).map((lot) => (
            <LotRow key={lot.id} lot={lot} blockWidth={blockWidth} orders={ordersOf.get(lot.id) ?? NONE} units={units} mayDraw={mayDraw} onOpen={onOpen} />
          ))}
        </tbody>
      </Table>
      {lots.length > shown && (
        <div className="px-4 py-3 sm:px-[26px]">
          <Button onClick={() => setShown(shown + AT_ONCE)}>
            Show {Math.min(AT_ONCE, lots.length - shown)} more of {lots.length} lots
          </Button>
        </div>
      )}
    </>
  )
}
