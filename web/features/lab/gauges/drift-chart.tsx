import { DRIFT_LIMITS } from '#shared/domain/standard-count.ts'
import type { GaugeDetail } from '#shared/schemas/gauge.ts'
import { TRUE_MINUS } from '#shared/units/format.ts'
import { driftText } from '#web/components/gauge/gauge-words.ts'
import { useMeasuredWidth } from '#web/components/drawing/use-measured-width.ts'
import { layOutDrift, type DriftOf, type DriftPoint } from './drift-chart-layout.ts'

const PANEL = 138
const TEXT = 12
const dayName = new Intl.DateTimeFormat('en-US', { month: 'short', day: 'numeric', timeZone: 'UTC' })
const signed = (value: number): string => (value < 0 ? `${TRUE_MINUS}${-value}` : `+${value}`)

/** A dot is within its limit, a cross is out of it, a small ring is void. */
function Mark({ point: { x, y, kind, stands } }: { point: DriftPoint }) {
  if (kind === 'bad') return <path d={`M${x - 5} ${y - 5}l10 10m0 -10l-10 10`} stroke="var(--bad)" strokeWidth={2.2} />
  if (kind === 'void') return <circle cx={x} cy={y} r={3} fill="var(--raised)" stroke="var(--ink-3)" strokeWidth={1.4} />
  return <circle cx={x} cy={y} r={3.2} fill={stands ? 'var(--ink)' : 'var(--raised)'} stroke="var(--ink)" strokeWidth={1.4} />
}

function Panel({ gauge, of, width, dated }: { gauge: GaugeDetail; of: DriftOf; width: number; dated: boolean }) {
  const limit = DRIFT_LIMITS[of]
  const height = PANEL + (dated ? 24 : 0)
  const frame = { left: 40, right: width - 8, top: 22, bottom: PANEL - 8 }
  const { points, path, zero, limits, days, dayAt } = layOutDrift(gauge.counts, of, limit, frame)
  const bad = points.filter((point) => point.kind === 'bad').length
  const name = of === 'density' ? 'Density' : 'Moisture'
  const words = `Drift of ${name.toLowerCase()}, ${points.length} ${points.length === 1 ? 'count' : 'counts'}, ${bad} out of ±${limit}\u2009%`
  return (
    <svg role="img" aria-label={words} width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="block">
      <rect x={frame.left} y={limits[0]?.y} width={Math.max(0, frame.right - frame.left)} height={(limits[1]?.y ?? 0) - (limits[0]?.y ?? 0)} fill="var(--film)" />
      <path d={`M${frame.left} ${zero}H${frame.right}`} stroke="var(--rule-2)" />
      {limits.map(({ value, y }) => (
        <path key={value} d={`M${frame.left} ${y}H${frame.right}`} stroke="var(--ink)" strokeDasharray="6 4" />
      ))}
      {gauge.calibrations.map(({ id, calibratedOn }) => {
        const x = dayAt(calibratedOn)
        return x === null ? null : (
          <g key={id}>
            <path d={`M${x} ${frame.top}V${frame.bottom}`} stroke="var(--ink)" />
            <text x={x + 4} y={frame.top + 11} fontSize={11} fill="var(--ink)">
              calibrated
            </text>
          </g>
        )
      })}
      <g fontSize={TEXT} fontFamily="var(--font-mono)" fill="var(--ink-2)">
        {[...limits, { value: 0, y: zero }].map(({ value, y }) => (
          <text key={value} x={frame.left - 6} y={y + 4} textAnchor="end">
            {value === 0 ? '0' : signed(value)}
          </text>
        ))}
        {dated &&
          days.map(({ at, x }, index) => (
            <text key={at} x={x} y={PANEL + 14} textAnchor={index === 0 ? 'start' : index === days.length - 1 ? 'end' : 'middle'}>
              {dayName.format(at)}
            </text>
          ))}
      </g>
      <path d={path} fill="none" stroke="var(--ink)" strokeWidth={1.4} />
      <g fill="none">
        {points.map((point) => (
          <Mark key={point.id} point={point} />
        ))}
      </g>
      <g fontSize={11} fill="var(--ink-2)">
        {points.map(({ id, x, y, beyond }) =>
          beyond === null ? null : (
            <text key={id} x={x > width / 2 ? x - 8 : x + 8} y={y + 4} textAnchor={x > width / 2 ? 'end' : 'start'}>
              {driftText(beyond)}
            </text>
          ),
        )}
      </g>
      <text x={frame.left} y={13} fontSize={TEXT} fontWeight={600} fill="var(--ink)">
        {name}, % from its reference
      </text>
    </svg>
  )
}

/** Every count of a gauge as its deviation from the reference of its day, with the limits. */
export function DriftChart({ gauge }: { gauge: GaugeDetail }) {
  const [ref, width] = useMeasuredWidth(560)
  return (
    <div ref={ref} className="grid w-full grid-cols-[minmax(0,1fr)] gap-1">
      <Panel gauge={gauge} of="density" width={width} dated={false} />
      <Panel gauge={gauge} of="moisture" width={width} dated />
      <ul aria-label="Marks" className="m-0 flex list-none flex-wrap gap-x-5 gap-y-1 p-0 text-small text-ink-2">
        {([['good', 'within'], ['bad', 'out of limits'], ['void', 'void']] as const).map(([kind, words]) => (
          <li key={kind} className="flex items-center gap-2">
            <svg aria-hidden width="14" height="14" viewBox="0 0 14 14" fill="none">
              <Mark point={{ id: kind, x: 7, y: 7, kind, beyond: null, stands: true }} />
            </svg>
            {words}
          </li>
        ))}
      </ul>
    </div>
  )
}
