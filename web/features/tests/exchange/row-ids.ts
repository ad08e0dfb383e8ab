const hex = (bytes: Uint8Array): string => [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('')

/** A UUID that is the same for the same text wherever it is made (RFC 9562, version 8, of the text's SHA-256). */
export async function uuidOf(text: string): Promise<string> {
  const digest = new Uint8Array(await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text))).slice(0, 16)
  digest[6] = ((digest[6] ?? 0) & 0x0f) | 0x80
  digest[8] = ((digest[8] ?? 0) & 0x3f) | 0x80
  return hex(digest).replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5')
}

/**
 * The record that each line of a file becomes on a site, from what the line says: the same line makes the same record, in a
 * file that has grown since as well, so that taking it in twice records it once. Equal lines are told apart by their order.
 */
export async function rowIds(siteId: string, rows: readonly (readonly string[])[]): Promise<string[]> {
  const seen = new Map<string, number>()
  return Promise.all(
    rows.map((fields) => {
      const text = JSON.stringify(fields.map((field) => field.trim())).replace(/(,"")+\]$/, ']')
      const before = seen.get(text) ?? 0
      seen.set(text, before + 1)
      return uuidOf(JSON.stringify(['test', siteId, text, before]))
    }),
  )
}
