import { setupServer } from 'msw/node'

/** Answers the component tests' requests: each test says with apiStandIn.use(http.get('/api/…', …)) what the API answers. */
export const apiStandIn = setupServer()
