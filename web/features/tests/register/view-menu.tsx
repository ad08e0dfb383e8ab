import { useState } from 'react'
import { toast } from 'sonner'
import type { SavedView } from '#shared/schemas/saved-view.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Menu, MenuItem, MenuLabel, MenuRule } from '#web/components/ui/menu.tsx'
import { useEditView } from '#web/data/view/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { contentOf, isSameContent } from './register-address.ts'
import { SaveViewDialog } from './save-view-dialog.tsx'
import type { RegisterControls } from './use-register.ts'
import { ViewsDialog } from './views-dialog.tsx'

type Asking = 'save' | 'manage' | null

/** The views of the register that a person keeps or was given, and what can be done with them. */
export function ViewMenu({ views, controls }: { views: readonly SavedView[]; controls: RegisterControls }) {
  const { site, can } = useSite()
  const [asking, setAsking] = useState<Asking>(null)
  const editing = useEditView(site.id)
  const { address, open } = controls
  const current = views.find((view) => view.id === address.view)
  const changed = current !== undefined && !isSameContent(current.content, contentOf(address))
  const groups = [
    { title: 'My views', views: views.filter((view) => !view.shared) },
    { title: 'Shared with the site', views: views.filter((view) => view.shared) },
  ].filter((group) => group.views.length > 0)
  const update = (view: SavedView): void => editing.mutate({ id: view.id, content: contentOf(address) }, { onSuccess: () => toast(`${view.name} updated.`) })
  return (
    <>
      <Menu
        align="start"
        trigger={
          <Button className="max-w-64 pointer-coarse:min-h-12">
            <span className="min-w-0 truncate">{current?.name ?? 'All tests'}</span>
            {changed && <span className="font-medium text-ink-2">changed</span>}
            <svg aria-hidden width="12" height="8" viewBox="0 0 12 8" className="shrink-0">
              <path d="M1 1.5l5 5 5-5" fill="none" stroke="currentColor" strokeWidth="1.6" />
            </svg>
            <span className="sr-only">, views of the register</span>
          </Button>
        }
      >
        <MenuItem onSelect={() => open(null)}>All tests, the usual columns</MenuItem>
        {groups.map((group) => (
          <div key={group.title} role="group" aria-label={group.title}>
            <MenuLabel>{group.title}</MenuLabel>
            {group.views.map((view) => (
              <MenuItem key={view.id} onSelect={() => open(view)}>
                {view.name}
                {view.isDefault && <span className="ml-auto text-small">opens first</span>}
              </MenuItem>
            ))}
          </div>
        ))}
        {can('view.save') && (
          <>
            <MenuRule />
            {changed && current.mayEdit && <MenuItem onSelect={() => update(current)}>Update {current.name} to this</MenuItem>}
            <MenuItem onSelect={() => setAsking('save')}>Save as a view</MenuItem>
            {views.length > 0 && <MenuItem onSelect={() => setAsking('manage')}>Rename, share or remove views</MenuItem>}
          </>
        )}
      </Menu>
      {asking === 'save' && <SaveViewDialog content={contentOf(address)} onSaved={(view) => open(view, true)} onClose={() => setAsking(null)} />}
      {asking === 'manage' && <ViewsDialog views={views} onClose={() => setAsking(null)} />}
    </>
  )
}
