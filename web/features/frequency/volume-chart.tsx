import { convertVolume } from '#shared/units/volume.ts'
import type { FrequencySeries } from '#shared/schemas/lot.ts'
import { GROUND_INKS } from '#shared/look/ground-look.ts'
import { useMeasuredWidth } from '#web/components/drawing/use-measured-width.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useUnits } from '#web/lib/site-context.tsx'
import { layOutChart, levelText } from './volume-chart-layout.ts'

const HEIGHT = 276
const dayName = new Intl.DateTimeFormat('en-US', { month: 'short', day: 'numeric', timeZone: 'UTC' })

/** Volume placed as a line, volume spoken for as the steps beneath it. */
export function VolumeChart({ days }: { days: FrequencySeries['days'] }) {
  const units = useUnits()
  const [ref, width] = useMeasuredWidth(960)
  const frame = { width, left: 52, right: width - 14, top: 26, bottom: HEIGHT - 30 }
  const convert = (cm3: number) => convertVolume(cm3, 'cm3', units.system === 'us' ? 'yd3' : 'm3')
  const layout = layOutChart(days, convert, frame, units.volumeNumber)
  const last = days.at(-1)
  if (layout === null || last === undefined) return null
  const words = `${units.volume(last.placedCm3)} placed and ${units.volume(last.spokenCm3)} spoken for by ${dayName.format(Date.parse(last.day))}`
  return (
    <div ref={ref} className="w-full">
      <svg role="img" aria-label={words} width={width} height={HEIGHT} viewBox={`0 0 ${width} ${HEIGHT}`} className="block">
        <g fontSize={11.5} fontFamily="var(--font-mono)" fill="var(--ink-2)">
          {layout.levels.map(({ value, y }) => (
            <g key={value}>
              <path d={`M${frame.left} ${y}H${frame.right}`} stroke="var(--rule)" />
              <text x={frame.left - 8} y={y + 4} textAnchor="end">
                {levelText(value)}
              </text>
            </g>
          ))}
          {layout.days.map(({ at, x }, index) => (
            <text key={at} x={Math.min(x, width - 24)} y={frame.bottom + 18} textAnchor={index === 0 ? 'start' : 'middle'}>
              {dayName.format(at)}
            </text>
          ))}
        </g>
        <path d={layout.spokenArea} fill={GROUND_INKS.meetsSpec.css} fillOpacity={0.7} />
        <path d={layout.spokenPath} fill="none" stroke="var(--good)" strokeWidth={1.6} />
        <path d={layout.placedPath} fill="none" stroke="var(--ink)" strokeWidth={2} />
        <g fontSize={13} fontWeight={700} fill="var(--ink)" paintOrder="stroke" strokeLinejoin="round">
          {layout.labels.map(({ text, x, y, end }, index) => (
            <text key={text} x={x} y={y} textAnchor={end ? 'end' : 'start'} stroke={index === 0 ? 'var(--raised)' : 'none'} strokeWidth={3}>
              {text}
            </text>
          ))}
        </g>
      </svg>
      <details className="mt-1">
        <summary className="link-ink inline-flex w-fit cursor-pointer items-center text-small pointer-coarse:min-h-11">Figures by working day</summary>
        <div className="mt-2 max-h-72 overflow-y-auto">
          <Table caption="Volume placed and spoken for by working day" className="max-w-[520px]">
            <thead>
              <tr>
                <HeadCell>Working day</HeadCell>
                <HeadCell numeric>Placed, {units.marks.volume}</HeadCell>
                <HeadCell numeric>Spoken for, {units.marks.volume}</HeadCell>
              </tr>
            </thead>
            <tbody>
              {[...days].reverse().map((day) => (
                <Row key={day.day}>
                  <RowHead>{dayName.format(Date.parse(day.day))}</RowHead>
                  <Cell numeric>{units.volumeNumber(day.placedCm3)}</Cell>
                  <Cell numeric>{units.volumeNumber(day.spokenCm3)}</Cell>
                </Row>
              ))}
            </tbody>
          </Table>
        </div>
      </details>
    </div>
  )
}
