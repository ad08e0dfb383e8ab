import { classNames } from '#web/lib/class-names.ts'

/** `act` is the orange of the cab sheet: the one thing to do to the ground in front of the machine. */
export type ButtonKind = 'primary' | 'plain' | 'danger' | 'quiet' | 'act'
export type ButtonSize = 'regular' | 'touch' | 'cab'

const BASE =
  'inline-flex items-center justify-center gap-2 rounded-ctl border-[1.5px] font-semibold select-none no-underline disabled:opacity-40 disabled:cursor-not-allowed'

const KINDS: Readonly<Record<ButtonKind, string>> = {
  primary: 'bg-ink border-ink text-raised enabled:hover:bg-ink-2 enabled:hover:border-ink-2',
  plain: 'bg-raised border-ink text-ink enabled:hover:bg-film',
  danger: 'bg-raised border-bad text-bad enabled:hover:bg-film',
  quiet: 'border-transparent text-ink underline underline-offset-3 decoration-1 enabled:hover:decoration-2',
  act: 'bg-rework border-rework text-[#1c0b02] font-bold',
}

const SIZES: Readonly<Record<ButtonSize, string>> = {
  regular: 'min-h-9 text-body px-[18px] pt-[9px] pb-[7px] leading-[1.25]',
  touch: 'min-h-12 text-entry px-5 pt-3 pb-[10px]',
  cab: 'min-h-[60px] w-full text-[20px] px-5 pt-[18px] pb-4 leading-[1.2] font-bold',
}

/** The look of a button, for links that act as one. */
export function buttonClasses(kind: ButtonKind = 'plain', size: ButtonSize = 'regular', extra?: string): string {
  return classNames(BASE, KINDS[kind], SIZES[size], kind === 'quiet' && 'px-1', extra)
}
