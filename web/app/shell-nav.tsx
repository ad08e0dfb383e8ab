import { NavLink } from 'react-router-dom'
import { classNames } from '#web/lib/class-names.ts'

export type NavItem = {
  readonly label: string
  readonly to: string
  /** How much waits there, and what it is: 2, "open orders". */
  readonly count?: number | undefined
  readonly countOf?: string | undefined
}

/** The count on an item: orange because it counts ground in rework. */
export function NavCount({ count, countOf = 'waiting' }: { count: number; countOf?: string | undefined }) {
  return (
    <span className="num ml-[6px] inline-block rounded-[2px] bg-rework px-[5px] pt-[3px] pb-px text-cap leading-none font-bold text-[#1c0b02]">
      {count} <span className="sr-only">{countOf}</span>
    </span>
  )
}

export function ShellNav({ items }: { items: readonly NavItem[] }) {
  return (
    <nav aria-label="Sheets" className="hidden h-full gap-1 lg:flex">
      {items.map(({ label, to, count, countOf }) => (
        <NavLink
          key={to}
          to={to}
          className={({ isActive }) =>
            classNames(
              'flex h-full items-center border-b-3 px-3 pt-[5px] font-semibold whitespace-nowrap no-underline -outline-offset-3',
              isActive ? 'border-ink text-ink' : 'border-transparent text-ink-2 hover:text-ink',
            )
          }
        >
          {`${label} `}
          {count !== undefined && count > 0 && <NavCount count={count} countOf={countOf} />}
        </NavLink>
      ))}
    </nav>
  )
}
