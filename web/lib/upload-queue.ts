import { ATTACHMENT_LIMITS, type Attachment, type AttachmentQuery } from '#shared/schemas/attachment.ts'
import { isApiError } from './api-error.ts'

/** A file somebody chose for a record, until it is on the server. */
export type Upload = AttachmentQuery & {
  /** of the attachment it becomes: the same at every try, so that it is stored once */
  readonly id: string
  readonly siteId: string
  readonly file: File
  /** address of the picture at hand, null for a document */
  readonly preview: string | null
  readonly caption: string
  /** chosen: waits for the person; waiting: for its turn */
  readonly state: 'chosen' | 'waiting' | 'sending' | 'failed'
  /** share of its bytes that have left, 0 to 1 */
  readonly sent: number
  readonly error: string | null
  /** whether trying again can help */
  readonly retryable: boolean
}

type Send = (upload: Upload, onProgress: (share: number) => void, signal: AbortSignal) => Promise<Attachment>

/** Files on their way, kept in memory across pages; sent one after the other, so that a weak signal gets one through at least. */
export class UploadQueue {
  private uploads: readonly Upload[] = []
  private readonly listeners = new Set<() => void>()
  private readonly sentListeners = new Set<(siteId: string, attachment: Attachment) => void>()
  private sending: { readonly id: string; readonly abort: AbortController } | null = null

  constructor(private readonly send: Send) {}

  readonly list = (): readonly Upload[] => this.uploads

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener)
    return () => this.listeners.delete(listener)
  }

  /** Called with every file that has arrived. */
  readonly onSent = (listener: (siteId: string, attachment: Attachment) => void): (() => void) => {
    this.sentListeners.add(listener)
    return () => this.sentListeners.delete(listener)
  }

  /** Takes files up for a record; they wait until start() is called for it. */
  choose(siteId: string, subject: AttachmentQuery, files: Iterable<File>): void {
    const chosen = Array.from(files, (file): Upload => {
      const picture = file.type.startsWith('image/')
      const error = sizeProblem(file, picture)
      return {
        ...subject,
        id: crypto.randomUUID(),
        siteId,
        file,
        preview: picture ? URL.createObjectURL(file) : null,
        caption: '',
        state: error === null ? 'chosen' : 'failed',
        sent: 0,
        error,
        retryable: false,
      }
    })
    this.set([...this.uploads, ...chosen])
  }

  describe(id: string, caption: string): void {
    this.change(id, { caption })
  }

  start({ subject, subjectId }: AttachmentQuery): void {
    this.set(this.uploads.map((upload) => (upload.subject === subject && upload.subjectId === subjectId && upload.state === 'chosen' ? { ...upload, state: 'waiting' } : upload)))
    void this.sendNext()
  }

  retry(id: string): void {
    this.change(id, { state: 'waiting', error: null, sent: 0 })
    void this.sendNext()
  }

  /** Forgets a file; one that is under way is broken off. */
  drop(id: string): void {
    this.forget((upload) => upload.id === id)
  }

  dropAll({ subject, subjectId }: AttachmentQuery): void {
    this.forget((upload) => upload.subject === subject && upload.subjectId === subjectId)
  }

  /** Another person signs in at this screen: nothing chosen before goes out under another name. */
  clear(): void {
    this.forget(() => true)
  }

  private async sendNext(): Promise<void> {
    const next = this.uploads.find((upload) => upload.state === 'waiting')
    if (this.sending !== null || next === undefined) return
    const abort = new AbortController()
    const { id } = next
    this.sending = { id, abort }
    this.change(id, { state: 'sending', sent: 0 })
    try {
      const attachment = await this.send(next, (sent) => this.change(id, { sent }), abort.signal)
      this.forget((upload) => upload.id === id)
      for (const listener of this.sentListeners) listener(next.siteId, attachment)
    } catch (error) {
      this.change(id, { state: 'failed', error: wordsOf(error), retryable: canRetry(error) })
    } finally {
      this.sending = null
      void this.sendNext()
    }
  }

  private forget(which: (upload: Upload) => boolean): void {
    for (const upload of this.uploads.filter(which)) {
      if (upload.preview !== null) URL.revokeObjectURL(upload.preview)
      if (upload.id === this.sending?.id) this.sending.abort.abort()
    }
    this.set(this.uploads.filter((upload) => !which(upload)))
  }

  private change(id: string, change: Partial<Upload>): void {
    this.set(this.uploads.map((upload) => (upload.id === id ? { ...upload, ...change } : upload)))
  }

  private set(uploads: readonly Upload[]): void {
    this.uploads = uploads
    for (const listener of this.listeners) listener()
  }
}

function sizeProblem({ size }: File, picture: boolean): string | null {
  const most = picture ? ATTACHMENT_LIMITS.photoBytes : ATTACHMENT_LIMITS.documentBytes
  return size <= most ? null : `${picture ? 'A photo' : 'A document'} may have up to ${most / 1_000_000} MB. Send it in a smaller size; the others are kept.`
}

function wordsOf(error: unknown): string {
  return isApiError(error) ? error.message : 'Something went wrong on this page. The file is kept here; try again.'
}

/** An answer about the file itself stays the same; the network, the sign-in and the server's troubles pass. */
function canRetry(error: unknown): boolean {
  return !isApiError(error) || error.status < 400 || error.status >= 500 || [401, 403, 404, 429].includes(error.status)
}
