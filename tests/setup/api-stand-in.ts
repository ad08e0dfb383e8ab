import { http, HttpResponse } from 'msw'
import { setupServer } from 'msw/node'

/**
 * Answers the component tests' requests: each test says with apiStandIn.use(http.get('/api/…', …)) what the API answers. Only
 * that a record has no files goes without saying: several sheets ask for them beside what they are about.
 */
export const apiStandIn = setupServer(http.get('/api/sites/:siteId/attachments', () => HttpResponse.json({ attachments: [] })))
