import { useEffect, useId, useRef } from 'react'
import type { GroundCut } from '#shared/ground-codec.ts'
import { LiftBar } from '#web/components/drawing/lift-bar.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { useUnits } from '#web/lib/site-context.tsx'
import { bandAt, type RailBand, type RailScale } from './rail-scale.ts'

const FOCUS = 'has-focus-visible:outline-3 has-focus-visible:outline-ink has-focus-visible:outline-offset-2 has-focus-visible:z-10'

type OptionProps = { name: string; checked: boolean; onPick: () => void }

function SurfaceOption({ name, checked, onPick }: OptionProps) {
  return (
    <label
      className={classNames(
        'relative grid shrink-0 cursor-pointer place-items-center border-[1.5px] border-ink text-[12px] font-bold max-lg:h-12 max-lg:px-3 lg:mx-3 lg:mt-[9px] lg:h-7 pointer-coarse:lg:h-12',
        checked ? 'bg-ink text-raised' : 'bg-raised text-ink hover:bg-film',
        FOCUS,
      )}
    >
      <input type="radio" className="sr-only" name={name} checked={checked} onChange={onPick} />
      Surface
    </label>
  )
}

function BandOption({ band, name, checked, onPick }: OptionProps & { band: RailBand }) {
  const units = useUnits()
  const label = useRef<HTMLLabelElement>(null)
  useEffect(() => {
    if (checked) label.current?.scrollIntoView({ block: 'nearest', inline: 'nearest' })
  }, [checked])
  return (
    <label ref={label} className={classNames('relative block shrink-0 cursor-pointer max-lg:w-[58px] lg:ml-11 lg:h-[50px] lg:w-[58px]', FOCUS)}>
      <input
        type="radio"
        className="sr-only"
        name={name}
        checked={checked}
        aria-label={`Lift ${band.lift}, up to ${units.elevation(band.topUm)}: ${band.words}`}
        onChange={onPick}
      />
      <LiftBar lift={band.lift} shares={band.shares} selected={checked} />
      <span aria-hidden className="num absolute top-[41px] -left-11 w-9 -translate-x-px pr-px text-right text-[10.5px] leading-none text-ink-2 max-lg:hidden">
        {units.number(units.system === 'us' ? band.bottomUm / 304_800 : band.bottomUm / 1e6, units.system === 'us' ? 1 : 2)}
      </span>
      <span aria-hidden className="absolute top-[46px] -left-2 h-px w-2 bg-ink-2 max-lg:hidden" />
    </label>
  )
}

/** The ruler in use: the one chosen, else the selected cell's zone's, else the first. */
export function chooseScale(scales: readonly RailScale[], chosen: string | null, zoneId: string | undefined): RailScale | undefined {
  return scales.find((scale) => scale.key === chosen) ?? scales.find((scale) => zoneId !== undefined && scale.zoneIds.includes(zoneId)) ?? scales[0]
}

function ZoneSwitch({ scales, scale, onChange }: { scales: readonly RailScale[]; scale: RailScale; onChange: (key: string) => void }) {
  return (
    <select
      aria-label="Lifts of zone"
      value={scale.key}
      onChange={(event) => onChange(event.target.value)}
      className="h-7 min-w-0 shrink-0 rounded-ctl border-[1.5px] border-rule-2 bg-raised px-1 text-[12px] font-semibold text-ink max-lg:h-12 max-lg:w-28 lg:mx-3 lg:mt-[9px]"
    >
      {scales.map(({ key, name }) => (
        <option key={key} value={key}>
          {name}
        </option>
      ))}
    </select>
  )
}

type LiftRailProps = {
  scales: readonly RailScale[]
  /** the one in use */
  scale: RailScale | undefined
  cut: GroundCut
  onScale: (key: string) => void
  onCut: (cut: GroundCut) => void
}

/** The elevations of the fill as a boring log: pick a lift and the sheet is cut there. Narrow, it lies along the top. */
export function LiftRail({ scales, scale, cut, onScale, onCut }: LiftRailProps) {
  const units = useUnits()
  const name = useId()
  const inside = bandAt(scale, cut)
  return (
    <div className="flex min-h-0 bg-raised max-lg:items-center max-lg:gap-2 max-lg:overflow-x-auto max-lg:border-b max-lg:border-rule-2 max-lg:px-2 max-lg:py-2 lg:flex-col lg:overflow-y-auto lg:border-r lg:border-rule-2 lg:pt-[14px] lg:pb-4">
      <p className="cap m-0 pl-4 max-lg:sr-only">Elevation, {units.marks.elevation}</p>
      {scale !== undefined && scales.length > 1 && <ZoneSwitch scales={scales} scale={scale} onChange={onScale} />}
      <div role="radiogroup" aria-label="Cut the sheet" className="flex shrink-0 max-lg:items-center max-lg:gap-1 lg:flex-col">
        <SurfaceOption name={name} checked={cut.kind === 'surface'} onPick={() => onCut({ kind: 'surface' })} />
        <div className="relative flex max-lg:gap-1 lg:mt-[18px] lg:flex-col">
          <span aria-hidden className="absolute -top-1 bottom-0 left-10 w-px bg-ink-2 max-lg:hidden" />
          {scale?.bands.map((band) => (
            <BandOption key={band.lift} band={band} name={name} checked={band === inside} onPick={() => onCut({ kind: 'elevation', um: band.middleUm })} />
          ))}
        </div>
      </div>
      <p className="mx-3 mt-6 mb-0 border-t border-rule-2 pt-2 text-[11.5px] leading-[1.3] font-medium text-ink-2 max-lg:hidden">Pick a lift to cut the sheet there</p>
    </div>
  )
}
