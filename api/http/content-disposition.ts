/** Tells a browser to save what it is sent under a name, whatever letters the name has (RFC 6266, RFC 8187). */
export function attachmentDisposition(fileName: string): string {
  const plain = fileName.replace(/[^\x20-\x7e]|["\\%]/g, '_')
  const encoded = encodeURIComponent(fileName).replace(/['()*!]/g, (mark) => `%${mark.charCodeAt(0).toString(16).toUpperCase()}`)
  return `attachment; filename="${plain}"; filename*=UTF-8''${encoded}`
}
