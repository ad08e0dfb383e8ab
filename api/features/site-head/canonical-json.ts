import { createHash } from 'node:crypto'
import canonicalize from 'canonicalize'

/** Canonical JSON (RFC 8785): dates as ISO text, undefined members left out, as JSON itself does. */
export function canonicalJson(value: unknown): string {
  const text = canonicalize(JSON.parse(JSON.stringify(value ?? null)))
  if (text === undefined) throw new Error('This value has no canonical JSON form')
  return text
}

export function sha256(text: string): string {
  return createHash('sha256').update(text, 'utf8').digest('hex')
}
