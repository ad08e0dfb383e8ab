import { Outlet } from 'react-router-dom'
import { Shell } from '#web/app/shell.tsx'
import { useShellUser } from '#web/app/use-shell-user.ts'

/** Around the pages that belong to no site. */
export function HomeLayout() {
  const { name, signOut } = useShellUser()
  return (
    <Shell nav={[]} user={{ name }} onSignOut={signOut}>
      <Outlet />
    </Shell>
  )
}
