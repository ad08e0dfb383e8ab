import { useState } from 'react'
import { TEXT_LIMITS } from '#shared/schemas/common.ts'
import { Button } from '#web/components/ui/button.tsx'
import { ProgressBar } from '#web/components/ui/progress-bar.tsx'
import { TextField } from '#web/components/ui/text-fields.tsx'
import { uploads } from '#web/data/attachment/uploads.ts'
import type { Upload } from '#web/lib/upload-queue.ts'
import { fileSize } from './file-words.ts'

/** Files chosen and not yet on the server: a caption to give, how far each is, what went wrong with it. */
export function UploadRows({ list, label }: { list: readonly Upload[]; label: string }) {
  if (list.length === 0) return null
  return (
    <ul aria-label={label} className="m-0 mb-3 list-none p-0">
      {list.map((upload) => (
        <UploadRow key={upload.id} upload={upload} />
      ))}
    </ul>
  )
}

function UploadRow({ upload }: { upload: Upload }) {
  const { id, file, preview, state } = upload
  const kilobytes = Math.max(1, Math.round(file.size / 1_000))
  return (
    <li aria-label={file.name} className="grid grid-cols-[56px_minmax(0,1fr)] gap-x-3 gap-y-2 border-b border-rule py-[10px] sm:grid-cols-[72px_minmax(0,1fr)]">
      <Picture preview={preview} />
      <div className="grid min-w-0 content-start gap-2">
        <div className="flex items-baseline gap-3">
          <span className="min-w-0 flex-1 truncate font-medium">
            {file.name} <span className="num text-small font-medium text-ink-2">{fileSize(file.size)}</span>
          </span>
          <button type="button" className="link-ink shrink-0 pointer-coarse:min-h-11" onClick={() => uploads.drop(id)}>
            {state === 'sending' ? 'Stop' : 'Leave out'}
          </button>
        </div>
        {state === 'chosen' && (
          <TextField label="What it shows" placeholder="optional" maxLength={TEXT_LIMITS.line} value={upload.caption} onChange={(event) => uploads.describe(id, event.target.value)} />
        )}
        {state === 'waiting' && <p className="m-0 text-small text-ink-2">Waits for its turn</p>}
        {state === 'sending' && <ProgressBar label="Sending" done={Math.round(upload.sent * kilobytes)} total={kilobytes} of="kB" />}
        {state === 'failed' && <Failure upload={upload} />}
      </div>
    </li>
  )
}

function Failure({ upload: { id, error, retryable } }: { upload: Upload }) {
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-2">
      <p role="alert" className="m-0 min-w-0 flex-1 basis-52 text-small font-medium text-bad">
        {error}
      </p>
      {retryable && (
        <Button className="pointer-coarse:min-h-12" onClick={() => uploads.retry(id)}>
          Try again
        </Button>
      )}
    </div>
  )
}

/** A format this browser cannot show leaves the film bare. */
function Picture({ preview }: { preview: string | null }) {
  const [bare, setBare] = useState(false)
  if (preview !== null && !bare) return <img src={preview} alt="" onError={() => setBare(true)} className="aspect-[4/3] w-full border border-rule-2 bg-film object-cover" />
  return (
    <span aria-hidden className="flex aspect-[4/3] items-center justify-center border border-rule-2 bg-film text-small font-bold">
      {preview === null && 'PDF'}
    </span>
  )
}
