import type { Request, RequestHandler, Response } from 'express'
import type { z } from 'zod'
import { invalid, notFound } from '#api/errors.ts'

interface Schemas {
  readonly params?: z.ZodType
  readonly query?: z.ZodType
  readonly body?: z.ZodType
}

export type Input<S extends Schemas> = {
  readonly [K in keyof S & keyof Schemas]: S[K] extends z.ZodType ? z.output<S[K]> : never
}

export interface InputIssue {
  /** 'body.sheet.wetMassG' */
  readonly path: string
  readonly message: string
}

/**
 * Checks params, query and body against their schemas and hands the results to the handler; every issue is told at once.
 * An address that does not fit its schema is simply not there: 404.
 */
export function validate<const S extends Schemas>(
  schemas: S,
  handle: (input: Input<S>, req: Request, res: Response) => unknown,
): RequestHandler {
  return async (req, res) => {
    const input: Record<string, unknown> = {}
    const issues: InputIssue[] = []
    for (const part of ['params', 'query', 'body'] as const) {
      const schema = schemas[part]
      if (!schema) continue
      const parsed = schema.safeParse(req[part] ?? {})
      if (parsed.success) input[part] = parsed.data
      else if (part === 'params') throw notFound()
      else issues.push(...parsed.error.issues.map(({ path, message }) => ({ path: [part, ...path].join('.'), message })))
    }
    if (issues.length > 0) {
      throw invalid('Some of this cannot be used, so nothing was saved. Correct what is marked and send it again.', { issues })
    }
    await handle(input as Input<S>, req, res)
  }
}
