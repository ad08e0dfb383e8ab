import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { canHandleFile, type FileSide } from '#shared/policies/attachment.ts'
import type { Attachment, AttachmentQuery } from '#shared/schemas/attachment.ts'
import { Button } from '#web/components/ui/button.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { attachmentQueries } from '#web/data/attachment/queries.ts'
import { uploads, useUploads } from '#web/data/attachment/uploads.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { FILE_TYPES, PHOTO_TYPES, PickFiles } from './add-files.tsx'
import { FileGrid, PrintedFiles } from './file-grid.tsx'
import { FileViewer } from './file-viewer.tsx'
import { shortHash } from './file-words.ts'
import { UploadRows } from './upload-rows.tsx'
import { WithdrawFileDialog } from './withdraw-file-dialog.tsx'

type SubjectFilesProps = {
  of: AttachmentQuery
  /** whose record it is, which says who adds and withdraws */
  side: FileSide
  title: string
  /** what to say while there is none */
  none: string
}

/** Photos and documents of one record: to see, to add, to withdraw. */
export function SubjectFiles({ of, side, title, none }: SubjectFilesProps) {
  const { site, role } = useSite()
  const { data, error, refetch } = useQuery(attachmentQueries.list(site.id, of))
  const pending = useUploads(of)
  const [shownId, setShownId] = useState<string | null>(null)
  const [withdrawing, setWithdrawing] = useState<Attachment | null>(null)
  const shown = data?.find(({ id }) => id === shownId)
  const standing = data?.filter((file) => file.withdrawn === null).length ?? 0
  const mayAdd = canHandleFile(role, 'file.attach', side)
  if (data?.length === 0 && pending.length === 0 && !mayAdd) return null
  return (
    <section className="mb-[22px]" aria-label={title}>
      <SectionHead aside={standing === 0 ? undefined : `${standing} ${standing === 1 ? 'file' : 'files'}`}>{title}</SectionHead>
      {data === undefined && error === null && <Skeleton label="The files are on their way" lines={[40]} />}
      {error !== null && (
        <p role="alert" className="m-0 mb-3 text-bad">
          {error.message}{' '}
          <button type="button" className="link-ink" onClick={() => void refetch()}>
            Try again
          </button>
        </p>
      )}
      {data?.length === 0 && <p className="m-0 mb-3 text-ink-2">{none}</p>}
      {data !== undefined && data.length > 0 && (
        <>
          <FileGrid files={data} onOpen={setShownId} />
          <PrintedFiles files={data} hashOf={shortHash} />
        </>
      )}
      {mayAdd && <AddFiles of={of} />}
      {data !== undefined && shown !== undefined && (
        <FileViewer files={data} file={shown} onShow={setShownId} onClose={() => setShownId(null)} onWithdraw={canHandleFile(role, 'file.withdraw', side) ? () => setWithdrawing(shown) : undefined} />
      )}
      {withdrawing !== null && (
        <WithdrawFileDialog
          file={withdrawing}
          onClose={() => setWithdrawing(null)}
          onDone={() => {
            setWithdrawing(null)
            setShownId(null)
          }}
        />
      )}
    </section>
  )
}

function AddFiles({ of }: { of: AttachmentQuery }) {
  const { site } = useSite()
  const pending = useUploads(of)
  const chosen = pending.filter((upload) => upload.state === 'chosen').length
  const pick = (files: readonly File[]): void => uploads.choose(site.id, of, files)
  return (
    <div className="print:hidden">
      <UploadRows list={pending} label="Files to send" />
      <div className="flex flex-wrap gap-2">
        {chosen > 0 && (
          <Button kind="primary" className="pointer-coarse:min-h-12" onClick={() => uploads.start(of)}>
            {`Send ${chosen === 1 ? 'the file' : `${chosen} files`}`}
          </Button>
        )}
        <span className="hidden pointer-coarse:contents">
          <PickFiles label="Take a photo" accept={PHOTO_TYPES} camera onPick={pick} />
        </span>
        <PickFiles label="Add photos or PDF" accept={FILE_TYPES} onPick={pick} />
      </div>
    </div>
  )
}
