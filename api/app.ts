import compression from 'compression'
import express from 'express'
import type { Express } from 'express'
import type { Deps } from '#api/deps.ts'
import { notFound } from '#api/errors.ts'
import { apiFeatures, siteFeatures } from '#api/features/index.ts'
import { sessionRoutes } from '#api/features/session/session.routes.ts'
import type { Authentication } from '#api/http/authentication.ts'
import { requireCsrfToken } from '#api/http/csrf.ts'
import { errorHandler } from '#api/http/error-handler.ts'
import { requestId } from '#api/http/request-id.ts'
import { requestLog } from '#api/http/request-log.ts'
import { requireMember } from '#api/http/require-member.ts'
import { requireUser } from '#api/http/require-user.ts'
import { securityHeaders } from '#api/http/security-headers.ts'
import { webClient } from '#api/http/web-client.ts'

/** The largest request body taken in. */
export const BODY_LIMIT = '256kb'
/** A new site brings its surveyed surfaces: some 20,000 points each. */
export const SITE_BODY_LIMIT = '4mb'
/** A batch of a file of tests, each with a long remark. */
export const IMPORT_BODY_LIMIT = '2mb'

export function createApp(deps: Deps, authentication: Authentication): Express {
  const { env, logger, dataSource } = deps
  const app = express()
  app.disable('x-powered-by')
  app.set('trust proxy', env.TRUSTED_PROXIES)
  app.use(requestId, requestLog(logger), securityHeaders(), compression())

  app.get('/api/health', async (_req, res) => {
    await dataSource.query('SELECT 1')
    res.json({ ok: true, app: 'hardpan' })
  })
  app.use('/api', ...authentication.handlers)
  app.post('/api/sites', requireUser, express.json({ limit: SITE_BODY_LIMIT }))
  app.post(['/api/sites/:siteId/tests/import', '/api/sites/:siteId/tests/import/preview'], requireUser, express.json({ limit: IMPORT_BODY_LIMIT }))
  app.use('/api', express.json({ limit: BODY_LIMIT }), requireCsrfToken)
  app.use('/api', sessionRoutes(deps, authentication.passport))
  for (const routes of apiFeatures) app.use('/api', routes(deps))
  app.use('/api/sites/:siteId', requireUser, requireMember(dataSource), ...siteFeatures.map((routes) => routes(deps)))
  app.use('/api', () => {
    throw notFound('There is no such address here.')
  })

  app.use(webClient(env.WEB_ROOT))
  app.use(errorHandler(logger))
  return app
}
