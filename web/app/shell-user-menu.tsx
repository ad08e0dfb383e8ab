import { Link } from 'react-router-dom'
import { NavCount, type NavItem } from '#web/app/shell-nav.tsx'
import { Menu, MenuChoice, MenuItem, MenuLabel, MenuLink, MenuRule } from '#web/components/ui/menu.tsx'
import { chooseTheme, useThemeChoice } from '#web/lib/theme.ts'

export type ShellUser = { readonly name: string; readonly role?: string | undefined }

const THEMES = [
  { value: 'device', label: 'As the device' },
  { value: 'light', label: 'Light, for sun' },
  { value: 'dark', label: 'Dark, for night' },
] as const

/** First letters of the first and last word of a name. */
export function initialsOf(name: string): string {
  const words = name.trim().split(/\s+/)
  const first = words[0] ?? ''
  const last = words.length > 1 ? (words.at(-1) ?? '') : ''
  return ([...first].slice(0, 1).join('') + [...last].slice(0, 1).join('')).toUpperCase()
}

/** Who is signed in, the look of the page, and the way out; on narrow screens the sheets as well. */
export function UserMenu({ user, nav, onSignOut }: { user: ShellUser; nav: readonly NavItem[]; onSignOut: () => void }) {
  const choice = useThemeChoice()
  const trigger = (
    <button type="button" className="flex min-h-11 items-center gap-[10px] text-left text-[13px]">
      <span aria-hidden className="grid size-8 place-items-center rounded-full bg-ink pt-px text-[12px] font-bold text-raised">
        {initialsOf(user.name)}
      </span>
      <span className="leading-[1.15] max-xl:sr-only">
        <span className="sr-only">Menu,</span> <b className="block font-semibold">{user.name}</b>{' '}
        {user.role !== undefined && <span className="block text-[12px] text-ink-2">{user.role}</span>}
      </span>
    </button>
  )
  return (
    <Menu trigger={trigger}>
      <div className="px-4 pt-2 pb-1 xl:hidden">
        <b className="block font-semibold">{user.name}</b>
        {user.role !== undefined && <span className="text-small text-ink-2">{user.role}</span>}
      </div>
      {nav.length > 0 && (
        <div className="border-b border-rule pb-1 lg:hidden">
          <MenuLabel>Sheets</MenuLabel>
          {nav.map(({ label, to, count, countOf }) => (
            <MenuLink key={to}>
              <Link to={to}>
                {`${label} `}
                {count !== undefined && count > 0 && <NavCount count={count} countOf={countOf} />}
              </Link>
            </MenuLink>
          ))}
        </div>
      )}
      <MenuLabel>Look</MenuLabel>
      <MenuChoice value={choice} options={THEMES} onChange={chooseTheme} />
      <MenuRule />
      <MenuItem onSelect={onSignOut}>Sign out</MenuItem>
    </Menu>
  )
}
