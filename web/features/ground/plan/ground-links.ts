import { paths } from '#web/app/paths.ts'

type NewTest =
  | { readonly stake: string }
  | { readonly follows: string; readonly kind: 'retest' | 'rerun' }
  | { readonly cell: string; readonly lift: number }

/** The recording sheet, started at a stake, at a cell, or after a test. */
export function newTestLink(siteId: string, start?: NewTest): string {
  const query = new URLSearchParams()
  for (const [name, value] of Object.entries(start ?? {})) query.set(name, String(value))
  const text = query.toString()
  return text === '' ? paths.newTest(siteId) : `${paths.newTest(siteId)}?${text}`
}
