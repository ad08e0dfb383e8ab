import type { EntityManager } from 'typeorm'
import { notFound } from '#api/errors.ts'
import { mayEditView } from '#api/features/views/view-rights.ts'
import type { Role } from '#shared/policies/role.ts'
import type { SavedView, ViewContent } from '#shared/schemas/saved-view.ts'

/** Who asks: their own views, what they may change and their default follow from it. */
export interface Viewer {
  readonly user: { readonly id: string }
  readonly role: Role
}

interface Row {
  readonly id: string
  readonly name: string
  readonly shared: number
  readonly author_id: string
  readonly author: string
  readonly content: ViewContent
  readonly chosen: string | null
}

const SELECT =
  'SELECT v.`id`, v.`name`, v.`shared`, v.`author_id`, u.`name` AS `author`, v.`content`, d.`view_id` AS `chosen` FROM `saved_view` v JOIN `user` u ON u.`id` = v.`author_id` LEFT JOIN `default_view` d ON d.`site_id` = v.`site_id` AND d.`view_id` = v.`id` AND d.`user_id` = ? WHERE v.`site_id` = ? AND (v.`author_id` = ? OR v.`shared` = 1)'

/** A person's own views of a site's register and those shared with everybody, by name. */
export async function listViews(manager: EntityManager, siteId: string, viewer: Viewer): Promise<SavedView[]> {
  const rows: Row[] = await manager.query(`${SELECT} ORDER BY v.\`name\`, v.\`id\``, [viewer.user.id, siteId, viewer.user.id])
  return rows.map((row) => present(row, viewer))
}

/** One of them; somebody else's own view is not there. */
export async function loadView(manager: EntityManager, siteId: string, id: string, viewer: Viewer): Promise<SavedView> {
  const [row]: Row[] = await manager.query(`${SELECT} AND v.\`id\` = ?`, [viewer.user.id, siteId, viewer.user.id, id])
  if (!row) throw notFound()
  return present(row, viewer)
}

function present(row: Row, viewer: Viewer): SavedView {
  const shared = Boolean(row.shared)
  return {
    id: row.id,
    name: row.name,
    shared,
    author: { id: row.author_id, name: row.author },
    content: row.content,
    isDefault: row.chosen !== null,
    mayEdit: mayEditView(viewer, { authorId: row.author_id, shared }),
  }
}
