import type { ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'

export type BannerTone = 'info' | 'off' | 'bad'

const EDGES: Readonly<Record<BannerTone, string>> = { info: 'border-ink', off: 'border-warn', bad: 'border-bad' }

type BannerProps = {
  tone?: BannerTone
  /** What happened, one sentence. */
  title: string
  /** What was kept, what to do. */
  children?: ReactNode
  /** One link or quiet button at the right. */
  action?: ReactNode
  className?: string
}

export function Banner({ tone = 'info', title, children, action, className }: BannerProps) {
  return (
    <div
      role={tone === 'bad' ? 'alert' : 'status'}
      className={classNames('flex flex-wrap items-center gap-x-[14px] gap-y-1 border-l-[5px] bg-film text-ink px-4 pt-[11px] pb-[9px]', EDGES[tone], className)}
    >
      <p className="m-0 flex-1 basis-52">
        <b className="font-bold">{title}</b> {children}
      </p>
      {action !== undefined && <span className="link-ink ml-auto whitespace-nowrap">{action}</span>}
    </div>
  )
}
