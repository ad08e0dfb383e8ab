import type { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { eventRoutes } from '#api/features/events/events.routes.ts'
import { memberRoutes } from '#api/features/members/members.routes.ts'

/** Routers mounted at /api, for a signed-in person and no site in particular. */
export const apiFeatures: readonly ((deps: Deps) => Router)[] = []

/** Routers mounted at /api/sites/:siteId (mergeParams), behind the check that the person belongs to the site. */
export const siteFeatures: readonly ((deps: Deps) => Router)[] = [memberRoutes, eventRoutes]
