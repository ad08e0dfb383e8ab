import type { RequestHandler } from 'express'
import type { DataSource } from 'typeorm'
import { userOf } from '#api/http/require-user.ts'
import { loadMember } from '#api/features/site-head/load-member.ts'

/** 404 for everything under a site the person does not belong to, before anything else of the request is looked at. */
export function requireMember(dataSource: DataSource): RequestHandler<{ siteId: string }> {
  return async (req, _res, next) => {
    await loadMember(dataSource.manager, req.params.siteId, userOf(req).id)
    next()
  }
}
