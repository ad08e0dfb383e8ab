import type { Board } from '#shared/schemas/ground.ts'
import { stateFill } from '#web/components/drawing/state-fill.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { filledShare } from './filled-share.ts'

type ZoneTotal = Board['zones'][number]

/** A zone's design volume as a bar: released, placed and not released, not placed. */
function ZoneBar({ zone }: { zone: ZoneTotal }) {
  const width = 338
  const share = (cm3: number): number => (zone.designCm3 > 0 ? Math.min(1, cm3 / zone.designCm3) * width : 0)
  return (
    <svg aria-hidden width="100%" height={10} viewBox={`0 0 ${width} 10`} preserveAspectRatio="none" className="mt-1 block">
      <rect width={width} height={10} fill={stateFill('not-placed')} />
      <rect width={share(zone.placedCm3)} height={10} fill={stateFill('meets-spec')} />
      <rect width={share(zone.releasedCm3)} height={10} fill={stateFill('released')} />
      <rect x={0.5} y={0.5} width={width - 1} height={9} fill="none" stroke="var(--ink)" vectorEffect="non-scaling-stroke" />
    </svg>
  )
}

/** How far each zone has come, by volume. */
export function ZoneProgress({ zones }: { zones: readonly ZoneTotal[] }) {
  const { units, zone: zoneOf } = useSite()
  return (
    <ul aria-label="By zone" className="m-0 mt-[10px] list-none p-0">
      {zones.map((zone) => (
        <li key={zone.zoneId} className="border-t border-rule py-[9px] leading-[1.3]">
          <span className="flex items-baseline gap-3">
            <b className="min-w-0 flex-1 font-semibold">{zoneOf(zone.zoneId)?.name}</b>
            <span className="font-semibold">{units.percent(filledShare(zone.placedCm3, zone.designCm3))}</span>
          </span>
          <ZoneBar zone={zone} />
          <span className="mt-1 block text-small text-ink-2">
            {units.volumeNumber(zone.placedCm3)} of {units.volume(zone.designCm3)} placed, {units.volume(zone.releasedCm3)} released
          </span>
        </li>
      ))}
    </ul>
  )
}
