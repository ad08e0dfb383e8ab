import type { RegisterTest } from '#shared/schemas/test-register.ts'
import { NO_VALUE } from '#shared/units/format.ts'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { markOf, resultWord } from '#web/features/tests/outcome-words.ts'

/** Whether the result is still in force, where it is not. */
function standingOf({ voided, superseded, current }: RegisterTest): string {
  if (voided) return 'void'
  if (superseded) return 'out of force'
  return current ? '' : 'retested'
}

/** Result, mark and whether it is still in force. */
export function ResultCell({ test }: { test: RegisterTest }) {
  const standing = standingOf(test)
  const off = standing !== ''
  return (
    <span className="flex items-center gap-2 whitespace-nowrap">
      <TestMark outcome={markOf(test)} verification={test.purpose === 'verification'} size={20} decorative className={classNames('-my-1', off && 'opacity-45')} />
      <span className={classNames(test.voided && 'line-through', off && 'text-ink-2')}>{resultWord(test)}</span>
      {off && <span className="text-small text-ink-2">{standing}</span>}
    </span>
  )
}

/** The first flag in its words, and how many more there are; all of them said to whoever points at it. */
export function FlagsCell({ flags }: { flags: RegisterTest['flags'] }) {
  const [first, ...more] = flags
  if (first === undefined) return <span className="text-ink-3">{NO_VALUE}</span>
  return (
    <span title={flags.map((flag) => flag.message).join('\n')} className="flex max-w-52 gap-1 text-warn">
      <span className="min-w-0 truncate">{first.message}</span>
      {more.length > 0 && <span className="shrink-0 font-semibold">+{more.length}</span>}
    </span>
  )
}
