import type { IncomingMessage } from 'node:http'
import type { RequestHandler } from 'express'
import helmet from 'helmet'

const HOST = /^[\w.:[\]-]+$/

/** Sockets of this very host: older browsers do not count them as 'self'. */
function ownSockets(req: IncomingMessage): string {
  const { host } = req.headers
  return host && HOST.test(host) ? `ws://${host} wss://${host}` : "'self'"
}

/**
 * Headers that keep other sites' code, frames and connections out. The map's worker needs worker-src; the toasts and
 * dialogs put <style> elements in the page, which is why styles alone may be inline.
 */
export function securityHeaders(): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'", ownSockets],
        workerSrc: ["'self'", 'blob:'],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
      },
    },
    referrerPolicy: { policy: 'same-origin' },
    xFrameOptions: { action: 'deny' },
  })
}
