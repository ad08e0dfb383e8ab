import { Router } from 'express'
import { z } from 'zod'
import type { Deps } from '#api/deps.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { loadReleaseCheck } from '#api/features/releases/check-release.queries.ts'
import { isHoldPoint } from '#api/features/releases/holds.ts'
import { listReleases } from '#api/features/releases/releases.queries.ts'
import { acceptRelease, createRelease, declineRelease, issueAsked } from '#api/features/releases/releases.service.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { requireUser, userOf } from '#api/http/require-user.ts'
import { validate } from '#api/http/validate.ts'
import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import { recordParamsSchema, siteParamsSchema } from '#shared/schemas/common.ts'
import { groundWriteSchema } from '#shared/schemas/placement.ts'
import { createReleaseSchema, declineReleaseSchema, issueReleaseSchema, releaseCheckInputSchema, releaseCheckSchema, releaseListSchema } from '#shared/schemas/release.ts'

const querySchema = z.object({ limit: z.coerce.number().int().min(1).max(2_000).default(200) })

const releasesOrAsks = (role: Role): boolean => can(role, 'release.issue') || can(role, 'release.ask')
const declines = (role: Role): boolean => can(role, 'release.issue') || can(role, 'release.accept')

/** Mounted at /api/sites/:siteId. */
export function releaseRoutes(deps: Deps): Router {
  const router = Router({ mergeParams: true })

  router.get(
    '/releases',
    requireUser,
    validate({ params: siteParamsSchema, query: querySchema }, async ({ params: { siteId }, query: { limit } }, req, res) => {
      const releases = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, ({ manager }) => listReleases(manager, siteId, limit))
      res.json(releaseListSchema.parse({ releases }))
    }),
  )

  router.post(
    '/releases/check',
    requireUser,
    validate({ params: siteParamsSchema, body: releaseCheckInputSchema }, async ({ params: { siteId }, body }, req, res) => {
      const check = await readSite(deps, { siteId, userId: userOf(req).id, verb: 'registers.see' }, async ({ manager }) => {
        const plan = await loadSitePlan(manager, siteId)
        const { red, amber, verdict, volumeCm3, cells } = await loadReleaseCheck(manager, plan, body)
        const hold = isHoldPoint(plan, plan.zone(body.zoneId), body.lift, cells.map(({ row }) => row.cell))
        return { red, amber, overridable: verdict === 'with-reason', hold, volumeCm3 }
      })
      res.json(releaseCheckSchema.parse(check))
    }),
  )

  router.post(
    '/releases',
    requireUser,
    validate({ params: siteParamsSchema, body: createReleaseSchema }, async ({ params: { siteId }, body }, req, res) => {
      const write = { siteId, userId: userOf(req).id, authorize: releasesOrAsks, request: { id: body.id, body } }
      const answer = await writeToSite(deps, write, (site) => createRelease(site, body))
      res.status(201).json(groundWriteSchema.parse(answer))
    }),
  )

  router.post(
    '/releases/:id/issue',
    requireUser,
    validate({ params: recordParamsSchema, body: issueReleaseSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const answer = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'release.issue' }, (site) => issueAsked(site, id, body.overrideReason))
      res.json(groundWriteSchema.parse(answer))
    }),
  )

  router.post(
    '/releases/:id/accept',
    requireUser,
    validate({ params: recordParamsSchema }, async ({ params: { siteId, id } }, req, res) => {
      const answer = await writeToSite(deps, { siteId, userId: userOf(req).id, verb: 'release.accept' }, (site) => acceptRelease(site, id))
      res.json(groundWriteSchema.parse(answer))
    }),
  )

  router.post(
    '/releases/:id/decline',
    requireUser,
    validate({ params: recordParamsSchema, body: declineReleaseSchema }, async ({ params: { siteId, id }, body }, req, res) => {
      const answer = await writeToSite(deps, { siteId, userId: userOf(req).id, authorize: declines }, (site) => declineRelease(site, id, body.reason))
      res.json(groundWriteSchema.parse(answer))
    }),
  )

  return router
}
