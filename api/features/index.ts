import type { Router } from 'express'
import type { Deps } from '#api/deps.ts'
import { attachmentRoutes } from '#api/features/attachments/attachments.routes.ts'
import { calibrationRoutes } from '#api/features/calibrations/calibrations.routes.ts'
import { dispositionRoutes } from '#api/features/dispositions/dispositions.routes.ts'
import { eventRoutes } from '#api/features/events/events.routes.ts'
import { gaugeRoutes } from '#api/features/gauges/gauges.routes.ts'
import { groundRoutes } from '#api/features/ground/ground.routes.ts'
import { inspectionRoutes } from '#api/features/inspections/inspections.routes.ts'
import { labRoutes } from '#api/features/lab/lab.routes.ts'
import { lotRoutes } from '#api/features/lots/lots.routes.ts'
import { memberRoutes } from '#api/features/members/members.routes.ts'
import { onePointRoutes } from '#api/features/one-point/one-point.routes.ts'
import { placementRoutes } from '#api/features/placements/placements.routes.ts'
import { rejudgeRoutes } from '#api/features/rejudge/rejudge.routes.ts'
import { releaseRoutes } from '#api/features/releases/releases.routes.ts'
import { reworkRoutes } from '#api/features/rework/rework.routes.ts'
import { siteRoutes, sitesRoutes } from '#api/features/sites/sites.routes.ts'
import { stakeRoutes } from '#api/features/stakes/stakes.routes.ts'
import { testExchangeRoutes } from '#api/features/test-exchange/test-exchange.routes.ts'
import { testRoutes } from '#api/features/tests/tests.routes.ts'
import { viewRoutes } from '#api/features/views/views.routes.ts'

/** Routers mounted at /api, for a signed-in person and no site in particular. */
export const apiFeatures: readonly ((deps: Deps) => Router)[] = [sitesRoutes]

/** Routers mounted at /api/sites/:siteId (mergeParams), behind the check that the person belongs to the site. */
export const siteFeatures: readonly ((deps: Deps) => Router)[] = [
  siteRoutes,
  labRoutes,
  calibrationRoutes,
  onePointRoutes,
  gaugeRoutes,
  memberRoutes,
  eventRoutes,
  groundRoutes,
  placementRoutes,
  inspectionRoutes,
  testExchangeRoutes,
  testRoutes,
  rejudgeRoutes,
  stakeRoutes,
  lotRoutes,
  reworkRoutes,
  releaseRoutes,
  dispositionRoutes,
  attachmentRoutes,
  viewRoutes,
]
