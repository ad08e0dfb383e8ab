import { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { listMembers } from '#api/features/members/members.queries.ts'
import { managesPeople, removeMember, setMember } from '#api/features/members/members.service.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { siteParamsSchema } from '#shared/schemas/common.ts'
import { memberInputSchema, memberListSchema, memberParamsSchema } from '#shared/schemas/member.ts'

/** Mounted at /api/sites/:siteId. */
export function memberRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/members',
    requireUser,
    validate({ params: siteParamsSchema }, async ({ params: { siteId } }, req, res) => {
      const members = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'site.see' }, ({ manager }) =>
        listMembers(manager, siteId),
      )
      res.json(memberListSchema.parse({ members }))
    }),
  )

  router.post(
    '/members',
    requireUser,
    validate({ params: siteParamsSchema, body: memberInputSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, authorize: managesPeople }
      const members = await writeToSite(deps, write, async (site) => {
        await setMember(site, body)
        return listMembers(site.manager, siteId)
      })
      res.json(memberListSchema.parse({ members }))
    }),
  )

  router.delete(
    '/members/:userId',
    requireUser,
    validate({ params: memberParamsSchema }, async ({ params: { siteId, userId } }, req, res) => {
      const write = { siteId, userId: userOf(req).id, authorize: managesPeople }
      await writeToSite(deps, write, (site) => removeMember(site, userId))
      res.status(204).end()
    }),
  )

  return router
}
