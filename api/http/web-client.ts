import { existsSync } from 'node:fs'
import path from 'node:path'
import express, { Router } from 'express'
import { notFound, unavailable } from '#api/errors.ts'

/** The built client: hashed files cached for good, its page for every address that is not a file. */
export function webClient(root: string): Router {
  const folder = path.resolve(root)
  const page = path.join(folder, 'index.html')
  const router = Router()
  router.use(
    '/assets',
    express.static(path.join(folder, 'assets'), { immutable: true, maxAge: '1y', index: false }),
    (_req, _res, next) => next(notFound()),
  )
  router.use(express.static(folder, { index: false, maxAge: 0 }))
  router.get('/{*path}', (_req, res, next) => {
    if (!existsSync(page)) {
      next(unavailable('The client is not built yet. Run npm start, or npm run build.'))
      return
    }
    res.sendFile('index.html', { root: folder, headers: { 'Cache-Control': 'no-cache' } })
  })
  return router
}
