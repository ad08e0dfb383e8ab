import { useState } from 'react'
import { dayWords } from '#shared/domain/gauge-check.ts'
import type { GaugeDetail, JudgedCountView } from '#shared/schemas/gauge.ts'
import { GaugeState } from '#web/components/gauge/gauge-state.tsx'
import { countText, countWords, driftText } from '#web/components/gauge/gauge-words.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { useUnits } from '#web/lib/site-context.tsx'

const AT_FIRST = 8

function CountRow({ count, onVoid }: { count: JudgedCountView; onVoid: ((count: JudgedCountView) => void) | undefined }) {
  const units = useUnits()
  const off = count.void !== null
  const figures = (value: number, percent: number | null, good: boolean) => (
    <Cell numeric className={classNames(off && 'line-through')}>
      {countText(value)} <span className={classNames('ml-1', !off && percent !== null && !good && 'font-semibold text-bad')}>{driftText(percent)}</span>
    </Cell>
  )
  return (
    <Row className={off ? 'text-ink-2' : ''}>
      <RowHead className="pl-0">
        {dayWords(count.day)}, {units.time(count.countedAt)}
      </RowHead>
      {figures(count.density, count.densityPercent, count.densityGood)}
      {figures(count.moisture, count.moisturePercent, count.moistureGood)}
      <Cell>
        {off || !count.stands ? countWords(count) : <GaugeState state={count.good ? 'good' : 'count-bad'} words={countWords(count)} />}
        <span className="block text-small text-ink-2">
          {count.void === null ? [count.countedBy, count.stability === null ? '' : 'with stability check', count.remarks].filter((part) => part !== '').join(', ') : `${count.void.by}: ${count.void.reason}`}
        </span>
      </Cell>
      <Cell className="pr-0 text-right">
        {!off && onVoid !== undefined && (
          <button type="button" className="link-ink text-small pointer-coarse:min-h-11" aria-label={`Void the count of ${dayWords(count.day)}, ${units.time(count.countedAt)}`} onClick={() => onVoid(count)}>
            Void
          </button>
        )}
      </Cell>
    </Row>
  )
}

/** Every count, newest first. */
export function CountLog({ gauge, onVoid }: { gauge: GaugeDetail; onVoid: ((count: JudgedCountView) => void) | undefined }) {
  const [all, setAll] = useState(false)
  const newest = gauge.counts.toReversed()
  if (newest.length === 0) return <p className="m-0 text-ink-2">No count yet. Its first four good days are compared with the calibration.</p>
  return (
    <>
      <Table caption={`Standard counts of gauge ${gauge.serial}`}>
        <thead>
          <tr>
            <HeadCell className="pl-0">Counted</HeadCell>
            <HeadCell numeric>Density</HeadCell>
            <HeadCell numeric>Moisture</HeadCell>
            <HeadCell>Result</HeadCell>
            <HeadCell aria-label="Act" />
          </tr>
        </thead>
        <tbody>
          {(all ? newest : newest.slice(0, AT_FIRST)).map((count) => (
            <CountRow key={count.id} count={count} onVoid={onVoid} />
          ))}
        </tbody>
      </Table>
      {!all && newest.length > AT_FIRST && (
        <button type="button" className="link-ink mt-2 text-small pointer-coarse:min-h-11" onClick={() => setAll(true)}>
          Show all {newest.length} counts
        </button>
      )}
    </>
  )
}
