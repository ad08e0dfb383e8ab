import type { ReactNode } from 'react'
import { GROUND_STATES } from '#shared/domain/ground-state.ts'
import { OVERLAY_LOOKS, stateLook } from '#shared/look/ground-look.ts'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { ProgressBar } from '#web/components/ui/progress-bar.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { StakeFlag } from '#web/components/ui/stake-flag.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { GalleryColumn, GalleryPart } from './gallery-part.tsx'

const OUTCOMES = ['passes', 'near', 'fails', 'suspect'] as const

function StateLine({ swatch, word, meaning }: { swatch: ReactNode; word: string; meaning: string }) {
  return (
    <li className="mb-[9px] grid grid-cols-[34px_1fr] items-center gap-3">
      {swatch}
      <span>
        <b className="block font-semibold">{word}</b>
        <span className="block text-small leading-[1.3] text-ink-2">{meaning}</span>
      </span>
    </li>
  )
}

export function GalleryGround() {
  return (
    <GalleryColumn>
      <GalleryPart title="Ground states">
        <ul className="m-0 list-none p-0">
          {GROUND_STATES.filter((state) => state !== 'none').map((state) => (
            <StateLine key={state} swatch={<StateSwatch state={state} size={34} />} word={stateLook(state).word} meaning={stateLook(state).meaning} />
          ))}
          <StateLine swatch={<StateSwatch state="meets-spec" near size={34} />} word={OVERLAY_LOOKS.near.word} meaning={OVERLAY_LOOKS.near.meaning} />
          <StateLine swatch={<StateSwatch state="released" near size={34} />} word="Released, near a limit" meaning={OVERLAY_LOOKS.near.meaning} />
          <StateLine swatch={<StateSwatch state="awaiting-test" covered size={34} />} word={OVERLAY_LOOKS.covered.word} meaning={OVERLAY_LOOKS.covered.meaning} />
        </ul>
      </GalleryPart>
      <GalleryPart title="Marks">
        <ul className="m-0 flex list-none flex-wrap gap-x-7 gap-y-3 p-0 text-[12px] font-medium text-ink-2">
          {OUTCOMES.map((outcome) => (
            <li key={outcome} className="grid justify-items-center gap-2">
              <TestMark outcome={outcome} size={30} decorative />
              {outcome}
            </li>
          ))}
          <li className="grid justify-items-center gap-2">
            <TestMark outcome="passes" verification size={30} decorative />
            verification
          </li>
          <li className="grid justify-items-center gap-2">
            <TestMark outcome="fails" verification size={30} decorative />
            verification fails
          </li>
          <li className="grid justify-items-center gap-2">
            <StakeFlag label="N1" className="mt-1 mb-[6px]" />
            go here next
          </li>
        </ul>
      </GalleryPart>
      <GalleryPart title="Nothing here yet">
        <EmptyState title="No fill placed at lift 11">Choose cells on the Ground, or type a range, to record the first load.</EmptyState>
      </GalleryPart>
      <GalleryPart title="Loading">
        <Skeleton label="The register is on its way" />
      </GalleryPart>
      <GalleryPart title="Progress on long work">
        <ProgressBar label="Building the close-out package" done={12_400} total={20_000} of="tests" />
      </GalleryPart>
    </GalleryColumn>
  )
}
