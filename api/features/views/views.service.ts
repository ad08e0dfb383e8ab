import { Not } from 'typeorm'
import { DefaultViewEntity } from '#api/entities/default-view.entity.ts'
import { SavedViewEntity } from '#api/entities/saved-view.entity.ts'
import { conflict, forbidden } from '#api/errors.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { authorizeSharing } from '#api/features/views/view-rights.ts'
import { listViews, loadView } from '#api/features/views/views.queries.ts'
import type { CreateView, EditView, SavedView } from '#shared/schemas/saved-view.ts'

/** More than anybody tells apart by name. */
const VIEWS_KEPT = 100

/** Keeps a view of the register of tests; a view is no record of the site, so the audit trail does not hear of it. */
export async function createView(write: SiteWrite, { id, name, shared, content }: CreateView): Promise<SavedView> {
  const { manager, siteId, user, now } = write
  if (shared) authorizeSharing(write)
  await refuseTakenName(write, user.id, name)
  if ((await manager.countBy(SavedViewEntity, { siteId, authorId: user.id })) >= VIEWS_KEPT) throw conflict(`You keep ${VIEWS_KEPT} views of this site, which is as many as fit. Remove one first.`)
  await manager.insert(SavedViewEntity, { siteId, id, authorId: user.id, name, shared, content, createdAt: now, updatedAt: now })
  write.changed('view', id)
  return loadView(manager, siteId, id, write)
}

/** Renames, refills, shares or unshares a view. One that stops being shared is nobody's default but its author's. */
export async function editView(write: SiteWrite, id: string, edit: EditView): Promise<SavedView> {
  const { manager, siteId, now } = write
  const before = await loadEditable(write, id)
  if (edit.shared === true && !before.shared) authorizeSharing(write)
  if (edit.name !== undefined) await refuseTakenName(write, before.author.id, edit.name, id)
  await manager.update(SavedViewEntity, { siteId, id }, { ...edit, updatedAt: now })
  if (edit.shared === false) await manager.delete(DefaultViewEntity, { siteId, viewId: id, userId: Not(before.author.id) })
  write.changed('view', id)
  return loadView(manager, siteId, id, write)
}

/** Removes a view for good. */
export async function removeView(write: SiteWrite, id: string): Promise<void> {
  const { manager, siteId } = write
  await loadEditable(write, id)
  await manager.delete(DefaultViewEntity, { siteId, viewId: id })
  await manager.delete(SavedViewEntity, { siteId, id })
  write.changed('view', id)
}

/** The view that the register opens with for the person; null for none. */
export async function chooseDefaultView(write: SiteWrite, viewId: string | null): Promise<SavedView[]> {
  const { manager, siteId, user } = write
  if (viewId === null) await manager.delete(DefaultViewEntity, { siteId, userId: user.id })
  else {
    await loadView(manager, siteId, viewId, write)
    await manager.upsert(DefaultViewEntity, { siteId, userId: user.id, viewId }, ['siteId', 'userId'])
  }
  return listViews(manager, siteId, write)
}

async function loadEditable(write: SiteWrite, id: string): Promise<SavedView> {
  const view = await loadView(write.manager, write.siteId, id, write)
  if (!view.mayEdit) throw forbidden(`"${view.name}" is changed by ${view.author.name} or the QC lead. Nothing was changed; save your own under another name.`)
  return view
}

async function refuseTakenName({ manager, siteId }: SiteWrite, authorId: string, name: string, except?: string): Promise<void> {
  const taken = await manager.existsBy(SavedViewEntity, { siteId, authorId, name, ...(except === undefined ? {} : { id: Not(except) }) })
  if (taken) throw conflict(`A view is called "${name}" already. Nothing was saved; give it another name.`)
}
