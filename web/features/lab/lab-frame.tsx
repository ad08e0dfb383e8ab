import type { ReactNode } from 'react'
import { NavLink } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { isApiError } from '#web/lib/api-error.ts'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'

const VIEWS = [
  { label: 'Curves', to: paths.lab },
  { label: 'One-point checks', to: paths.onePoint },
  { label: 'Gauges', to: paths.gauges },
  { label: 'Calibrations', to: paths.calibrations },
] as const

type LabFrameProps = {
  /** What stands on the sheet, in one line. */
  summary?: ReactNode
  actions?: ReactNode
  /** What kept the sheet from being read, with a way to try again. */
  failed?: Error | null
  onRetry?: () => void
  children: ReactNode
}

/** The head of every sheet of the laboratory, with the way to the others. */
export function LabFrame({ summary, actions, failed = null, onRetry, children }: LabFrameProps) {
  const { site } = useSite()
  return (
    <div className="min-h-0 flex-1 overflow-y-auto bg-raised">
      {failed !== null && (
        <Banner tone="bad" title={isApiError(failed) ? failed.message : 'The laboratory’s sheets could not be read.'} action={<button type="button" onClick={onRetry}>Try again</button>}>
          Nothing is lost.
        </Banner>
      )}
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3 px-4 pt-[22px] sm:px-[26px]">
        <div>
          <h1 className="m-0 text-[19px] leading-[1.2] font-bold">Lab</h1>
          {summary !== undefined && <p className="m-0 mt-1 text-ink-2">{summary}</p>}
        </div>
        <div className="flex flex-wrap gap-2">{actions}</div>
      </div>
      <nav aria-label="Lab" className="mx-4 mt-3 mb-5 flex gap-[22px] overflow-x-auto border-b border-rule-2 sm:mx-[26px]">
        {VIEWS.map(({ label, to }) => (
          <NavLink
            key={label}
            end
            to={to(site.id)}
            className={({ isActive }) =>
              classNames('border-b-3 pt-2 pb-[7px] text-head font-semibold whitespace-nowrap no-underline -outline-offset-3 pointer-coarse:min-h-11', isActive ? 'border-ink text-ink' : 'border-transparent text-ink-2 hover:text-ink')
            }
          >
            {label}
          </NavLink>
        ))}
      </nav>
      {children}
    </div>
  )
}
