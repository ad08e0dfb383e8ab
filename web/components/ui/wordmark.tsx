import { GROUND_INKS } from '#shared/look/ground-look.ts'
import { classNames } from '#web/lib/class-names.ts'

/** Three lifts, one on the other: the mark and the name. */
export function Wordmark({ size = 'regular', className }: { size?: 'regular' | 'large'; className?: string }) {
  const large = size === 'large'
  return (
    <span className={classNames('inline-flex items-center leading-none font-extrabold tracking-[-0.01em] text-ink', large ? 'gap-[14px] text-[34px]' : 'gap-[10px] text-[21px]', className)}>
      <svg aria-hidden width={large ? 46 : 28} height={large ? 43 : 26} viewBox="0 0 28 26" stroke="var(--ink)" strokeWidth={1.2}>
        <path d="M2 5h24v3H2z" fill={GROUND_INKS.sand.css} />
        <path d="M2 10.5h24v4H2z" fill={GROUND_INKS.meetsSpec.css} />
        <path d="M2 17h24v6H2z" fill={GROUND_INKS.released.css} />
      </svg>
      <span className="translate-y-[0.06em]">Hardpan</span>
    </span>
  )
}
