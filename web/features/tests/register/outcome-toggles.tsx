import { outcomeSchema } from '#shared/schemas/field-test.ts'
import type { RegisterPage, TestFilter } from '#shared/schemas/test-register.ts'
import { TestMark, type TestOutcome } from '#web/components/ui/test-mark.tsx'
import { classNames } from '#web/lib/class-names.ts'
import type { RegisterControls } from './use-register.ts'

const WORDS: Readonly<Record<keyof RegisterPage['counts'], { readonly word: string; readonly mark: TestOutcome }>> = {
  pass: { word: 'Meet spec', mark: 'passes' },
  fail: { word: 'Fail', mark: 'fails' },
  suspect: { word: 'Suspect', mark: 'suspect' },
}

/** How the results share among what fits; pressed, only those are shown, any number of them together. */
export function OutcomeToggles({ counts, filter: { outcome = [] }, narrow }: { counts: RegisterPage['counts'] | undefined; filter: TestFilter; narrow: RegisterControls['narrow'] }) {
  const toggle = (one: (typeof outcome)[number]): void => {
    const next = outcomeSchema.options.filter((each) => (each === one ? !outcome.includes(each) : outcome.includes(each)))
    narrow({ outcome: next.length === 0 ? undefined : next })
  }
  return (
    <div role="group" aria-label="Result" className="flex border-[1.5px] border-rule-2 rounded-ctl bg-raised max-md:order-last max-md:w-full">
      {outcomeSchema.options.map((one, index) => (
        <button
          key={one}
          type="button"
          aria-pressed={outcome.includes(one)}
          onClick={() => toggle(one)}
          className={classNames('flex min-h-[35px] items-center gap-2 px-[10px] font-medium whitespace-nowrap pointer-coarse:min-h-[45px] max-md:flex-1 max-md:justify-center max-md:px-1', index > 0 && 'border-l border-rule-2', outcome.includes(one) ? 'bg-ink text-raised' : 'hover:bg-film')}
        >
          <TestMark outcome={WORDS[one].mark} size={19} decorative />
          <span>{WORDS[one].word}</span>{' '}
          <span className="num">{counts === undefined ? '' : counts[one].toLocaleString('en-US')}</span>
        </button>
      ))}
    </div>
  )
}
