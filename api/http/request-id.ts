import { randomUUID } from 'node:crypto'
import type { RequestHandler } from 'express'

/** Names every request, so that what a person reports can be found in the log. */
export const requestId: RequestHandler = (req, res, next) => {
  req.requestId = randomUUID()
  res.setHeader('X-Request-Id', req.requestId)
  next()
}
