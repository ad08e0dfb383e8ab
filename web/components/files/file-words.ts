import type { Attachment } from '#shared/schemas/attachment.ts'
import type { Units } from '#web/lib/units.ts'

/** "340 kB", "1.2 MB". */
export function fileSize(bytes: number): string {
  return bytes < 1_000_000 ? `${Math.max(1, Math.round(bytes / 1_000))}\u2009kB` : `${(bytes / 1_000_000).toFixed(1)}\u2009MB`
}

/** What a file is called on screen: its caption, else its name. */
export function fileTitle({ caption, fileName }: Pick<Attachment, 'caption' | 'fileName'>): string {
  return caption === '' ? fileName : caption
}

/** When it was taken, or, where no camera said so, added. */
export function whenWords({ takenAt, takenFrom }: Attachment, units: Units): string {
  return `${takenFrom === 'camera' ? 'taken' : 'added'} ${units.dateTime(takenAt)}`
}

/** The first twelve of its hash, as the audit trail shows them. */
export function shortHash(sha256: string): string {
  return sha256.slice(0, 12)
}
