import { forbidden } from '#api/errors.ts'
import type { Viewer } from '#api/features/views/views.queries.ts'
import { can } from '#shared/policies/policy.ts'

/** A view is changed by its author; a shared one also by the lead. */
export function mayEditView({ user, role }: Viewer, view: { readonly authorId: string; readonly shared: boolean }): boolean {
  return view.authorId === user.id || (view.shared && can(role, 'view.edit-shared'))
}

export function authorizeSharing({ role }: Viewer): void {
  if (!can(role, 'view.share')) throw forbidden('Views are shared with the site by quality control. Nothing was changed; keep it as your own.')
}
