import { GROUND_FLAGS } from '#shared/domain/ground-state.ts'
import { AcceptanceWindow, type PlottedTest } from '#web/components/drawing/acceptance-window.tsx'
import { LiftBar } from '#web/components/drawing/lift-bar.tsx'
import { LotBlocks } from '#web/components/drawing/lot-blocks.tsx'
import { StripLog } from '#web/components/drawing/strip-log.tsx'
import { PanelRow, PanelRows } from '#web/components/ui/panel-row.tsx'
import { StakeFlag } from '#web/components/ui/stake-flag.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { GalleryPart } from './gallery-part.tsx'

/** Drawn figures, not a soil: a parabola and the zero-air-voids line of Gs 2.68. */
const CURVE = Array.from({ length: 48 }, (_, index) => {
  const moisture = 8 + index * 0.2
  return { moisture, density: 117.6 - 0.5 * (moisture - 12.6) ** 2 * (moisture > 12.6 ? 1.15 : 0.8) }
})
const ZAV = Array.from({ length: 71 }, (_, index) => {
  const moisture = 6 + index * 0.2
  return { moisture, density: (62.4 * 2.68) / (1 + (2.68 * moisture) / 100) }
})
const POINTS = [
  { moisture: 8.6, density: 111.4 },
  { moisture: 10.4, density: 115.6 },
  { moisture: 12.3, density: 117.7 },
  { moisture: 14.5, density: 115.2 },
  { moisture: 16.6, density: 108.4 },
]
const ACCEPTED = { moistureMin: 10.6, moistureMax: 14.6, densityMin: 111.7 }
const TESTS: readonly PlottedTest[] = [
  { id: 'T-0219', moisture: 9.8, density: 112.7, outcome: 'fails', current: true },
  { id: 'T-0201', moisture: 13.2, density: 114.3, outcome: 'passes' },
  { id: 'T-0188', moisture: 10.8, density: 111.9, outcome: 'near' },
  { id: 'T-0177', moisture: 12.8, density: 115.2, outcome: 'passes', verification: true },
]
const STRIP = [
  { lift: 10, state: 'awaiting-test', flags: 0, title: 'Awaiting test', note: 'owes 2 of 3' },
  { lift: 9, state: 'released', flags: 0, title: '97.2 %', note: '+0.6 % from opt.' },
  { lift: 8, state: 'released', flags: GROUND_FLAGS.near, title: '95.1 %', note: '−1.9 % from opt.' },
  { lift: 7, state: 'awaiting-test', flags: GROUND_FLAGS.covered, title: 'Covered too early', note: 'since Nov 18' },
  { lift: 6, state: 'recheck', flags: 0, title: '96.9 %', note: 'rain on Nov 12' },
  { lift: 5, state: 'accepted-as-is', flags: 0, title: '94.6 %', note: 'engineer’s letter' },
] as const
const PLOT = { densityUnit: 'pcf', curve: CURVE, zav: { points: ZAV, label: 'zero air voids, Gs 2.68' }, accepted: ACCEPTED, limit: { density: 111.7, label: '95 % of 117.6' } }

export function GalleryDrawings() {
  return (
    <div className="grid gap-[30px] border-t border-rule-2 bg-raised px-5 py-[26px] sm:px-[30px] md:grid-cols-2 xl:grid-cols-[1fr_1fr_460px]">
      <GalleryPart title="Acceptance window">
        <AcceptanceWindow {...PLOT} label="Too dry: 9.8 %, 112.7 pcf" curvePoints={POINTS} tests={TESTS} />
      </GalleryPart>
      <GalleryPart title="Cell L8">
        <div className="grid grid-cols-[minmax(150px,1fr)_176px] gap-4">
          <StripLog label="Lifts of cell L8" rows={STRIP} />
          <AcceptanceWindow {...PLOT} label="Tests of cell L8" variant="small" tests={TESTS.map(({ current: _current, ...test }) => test)} />
        </div>
        <div className="mt-6 flex flex-wrap gap-2">
          <LiftBar lift={11} shares={[]} />
          <LiftBar lift={10} selected shares={[{ state: 'awaiting-test', share: 0.42 }, { state: 'suspect', share: 0.1 }, { state: 'not-placed', share: 0.48 }]} />
          <LiftBar lift={9} shares={[{ state: 'released', share: 0.55 }, { state: 'meets-spec', share: 0.25 }, { state: 'rework', share: 0.14 }]} />
          <LiftBar lift={8} shares={[{ state: 'released', share: 1 }]} />
          <LiftBar lift={7} shares={[{ state: 'released', share: 0.7 }, { state: 'meets-spec', share: 0.3 }]} />
        </div>
      </GalleryPart>
      <GalleryPart title="Lots and places">
        <div className="grid gap-3">
          <LotBlocks label="Pad L10" blocks={[{ share: 1, state: 'meets-spec' }, { share: 1, state: 'suspect' }, { share: 1, state: 'owed' }, { share: 0.44, state: 'owed' }]} maxWidth={400} />
          <LotBlocks label="Pad L9" blocks={[{ share: 1, state: 'released' }, { share: 1, state: 'released' }, { share: 1, state: 'rework' }, { share: 0.6, state: 'released', near: true }]} maxWidth={400} />
          <LotBlocks label="Court L6" blocks={Array.from({ length: 24 }, () => ({ share: 1, state: 'released' as const }))} maxWidth={400} />
        </div>
        <PanelRows label="Places">
          <PanelRow mark={<StakeFlag label="N1" />} title="Cell N4, pad lift 10" detail="E 5,412.6 N 2,208.3, draw 10-a" action={<a href="#main">Record</a>} />
          <PanelRow mark={<StateSwatch state="rework" />} title="Rework R-014, too dry" detail="9 cells, add 5,680 gal, working since 13:50" action={<button type="button">Show</button>} />
        </PanelRows>
      </GalleryPart>
    </div>
  )
}
