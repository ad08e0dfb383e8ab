import { useRef } from 'react'
import type { Curve, Material } from '#shared/schemas/lab.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { ErrorBoundary } from '#web/components/ui/error-boundary.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { issuesOf } from '#web/features/lab/lab-words.ts'
import { ApparatusFields } from './apparatus-fields.tsx'
import { CurveHeadFields } from './curve-head-fields.tsx'
import { FitStrip, LiveFit, useLiveCurve } from './live-fit.tsx'
import { ReferenceChoices } from './reference-choices.tsx'
import { SpecimensSection } from './specimens-section.tsx'
import { useCurveEntry, type CurveEntryState } from './use-curve-entry.ts'

type CurveEntryFormProps = { userId: string; materials: readonly Material[]; /** a draft to be put right */ curve: Curve | undefined }

const FIELDS = 'grid grid-cols-[minmax(0,1fr)] gap-3'

/** Puts the focus where the sheet first needs it, once it says so. */
function focusFirstError(sheet: HTMLFormElement | null): void {
  window.requestAnimationFrame(() => sheet?.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus())
}

export function CurveEntryForm({ userId, materials, curve }: CurveEntryFormProps) {
  const sheet = useRef<HTMLFormElement>(null)
  const state = useCurveEntry({ userId, materials, curve })
  const { form, entry, errorOf, set } = state
  const live = useLiveCurve(entry.points, { gs: state.gs, gsMeasured: form.gsMeasured, reported: state.reported })
  const leave = (
    <Button onClick={state.cancel} className="max-lg:min-h-12 max-lg:px-5">
      Cancel
    </Button>
  )
  const save = (
    <Button type="submit" kind="primary" busyLabel={state.busy && 'Saving'} className="max-lg:min-h-12 max-lg:flex-1">
      Save the curve
    </Button>
  )
  return (
    <form
      ref={sheet}
      noValidate
      aria-label={curve === undefined ? 'New reference curve' : `Correct ${curve.code}`}
      className="flex min-h-0 flex-1 flex-col"
      onSubmit={(event) => {
        event.preventDefault()
        state.save(() => focusFirstError(sheet.current))
      }}
    >
      <header className="flex shrink-0 flex-wrap items-center gap-x-[18px] border-b border-rule-2 bg-raised px-4 py-2 sm:min-h-14 sm:px-[26px] lg:border-b-2 lg:border-ink">
        <h1 className="m-0 text-[18px] font-bold">{curve === undefined ? 'New reference curve' : `Correct ${curve.code}`}</h1>
        <span className="text-ink-2 max-sm:hidden">It waits for the lead’s approval before it is in force</span>
        <span className="ml-auto flex gap-[10px] max-lg:hidden">
          {leave}
          {save}
        </span>
      </header>
      <div className="min-h-0 flex-1 overflow-y-auto lg:grid lg:grid-cols-[minmax(0,1fr)_minmax(400px,42%)] lg:overflow-hidden">
        <FitStrip live={live} />
        <div className="grid grid-cols-[minmax(0,1fr)] content-start gap-[22px] bg-raised px-4 pt-4 pb-6 sm:px-[26px] lg:overflow-y-auto lg:border-r lg:border-rule-2 lg:pt-5 pointer-coarse:[&_[role=radiogroup]_label]:min-h-12">
          <EntryNotices state={state} />
          <section>
            <SectionHead>Sample</SectionHead>
            <div className={FIELDS}>
              <CurveHeadFields form={form} materials={materials} gs={state.gs} errorOf={errorOf} onChange={set} />
            </div>
          </section>
          <SpecimensSection state={state} />
          <section>
            <SectionHead aside={form.method}>Apparatus</SectionHead>
            <div className={FIELDS}>
              <ApparatusFields form={form} check={state.method} errorOf={errorOf} onChange={set} />
            </div>
          </section>
          <section>
            <SectionHead aside="may be left out">Reported pair and stones</SectionHead>
            <ReferenceChoices form={form} errorOf={errorOf} onChange={set} />
          </section>
        </div>
        <div className="bg-sheet px-4 pt-[22px] pb-8 sm:px-[26px] max-lg:border-t max-lg:border-rule-2 lg:overflow-y-auto">
          <ErrorBoundary what="The fit">
            <LiveFit live={live} />
          </ErrorBoundary>
        </div>
      </div>
      <div className="flex shrink-0 gap-[10px] border-t-2 border-ink bg-raised px-4 py-2 lg:hidden">
        {leave}
        {save}
      </div>
    </form>
  )
}

/** What must be known about the whole sheet, over its fields. */
function EntryNotices({ state }: { state: CurveEntryState }) {
  const refused = issuesOf(state.refused)
  if (!state.restored && state.stopped === 0 && refused.length === 0) return null
  return (
    <div className="grid gap-2">
      {refused.length > 0 && (
        <Banner tone="bad" title="Not saved.">
          {refused.join(' ')}
        </Banner>
      )}
      {state.stopped > 0 && (
        <Banner tone="bad" title="Not saved yet.">
          {state.stopped === 1 ? 'One place needs' : `${state.stopped} places need`} a look. Everything typed is kept.
        </Banner>
      )}
      {state.restored && (
        <Banner
          title="What you typed here before is back."
          action={
            <button type="button" onClick={state.startAfresh}>
              Start afresh
            </button>
          }
        />
      )}
    </div>
  )
}
