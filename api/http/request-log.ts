import type { IncomingMessage, ServerResponse } from 'node:http'
import type { RequestHandler } from 'express'
import type { Logger } from 'pino'
import { pinoHttp } from 'pino-http'

/** One line per request at level info; neither cookies nor bodies reach the log. */
export function requestLog(logger: Logger): RequestHandler {
  return pinoHttp<IncomingMessage & { requestId?: string }, ServerResponse>({
    logger,
    genReqId: (req) => req.requestId ?? '',
    serializers: {
      req: (req: { id: string; method: string; url: string }) => ({ id: req.id, method: req.method, url: req.url }),
      res: (res: { statusCode: number }) => ({ statusCode: res.statusCode }),
    },
  })
}
