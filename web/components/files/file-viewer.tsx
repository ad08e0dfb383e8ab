import { Dialog as RadixDialog } from 'radix-ui'
import type { KeyboardEvent, ReactNode } from 'react'
import type { Attachment } from '#shared/schemas/attachment.ts'
import { Button } from '#web/components/ui/button.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { useFocusReturn } from '#web/components/ui/use-focus-return.ts'
import { fileAddress } from '#web/data/attachment/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { fileSize, fileTitle, shortHash, whenWords } from './file-words.ts'

type FileViewerProps = {
  files: readonly Attachment[]
  /** the one shown */
  file: Attachment
  onShow: (id: string) => void
  onClose: () => void
  /** asks for the reason; left out for who may not */
  onWithdraw?: (() => void) | undefined
}

const WIDE = 'pointer-coarse:min-h-12'

/** One file as large as the window; arrow keys go through the record's files, Escape closes. */
export function FileViewer({ files, file, onShow, onClose, onWithdraw }: FileViewerProps) {
  const focusReturn = useFocusReturn()
  const index = files.findIndex(({ id }) => id === file.id)
  const step = (by: number): void => {
    const next = files[(index + by + files.length) % files.length]
    if (next !== undefined) onShow(next.id)
  }
  const handleKey = (event: KeyboardEvent): void => {
    const by = { ArrowLeft: -1, ArrowRight: 1 }[event.key]
    if (by === undefined) return
    event.preventDefault()
    step(by)
  }
  return (
    <RadixDialog.Root open onOpenChange={(open) => !open && onClose()}>
      <RadixDialog.Portal>
        <RadixDialog.Overlay className="fixed inset-0 z-40 bg-[#14212a]/70" />
        <RadixDialog.Content {...focusReturn} aria-describedby={undefined} onKeyDown={handleKey} className="fixed inset-0 z-50 flex flex-col bg-raised text-ink sm:inset-4 sm:border-2 sm:border-ink">
          <header className="flex shrink-0 items-center gap-4 border-b border-rule-2 px-4 py-2 sm:px-[22px]">
            <RadixDialog.Title className="m-0 line-clamp-2 min-w-0 flex-1 text-head font-bold break-words">{fileTitle(file)}</RadixDialog.Title>
            {files.length > 1 && (
              <span className="num shrink-0 text-small text-ink-2" aria-live="polite">
                {index + 1} of {files.length}
              </span>
            )}
            <RadixDialog.Close asChild>
              <Button className={WIDE}>Close</Button>
            </RadixDialog.Close>
          </header>
          <Shown file={file} />
          <footer className="flex shrink-0 flex-wrap items-center gap-x-4 gap-y-2 border-t border-rule-2 px-4 py-2 sm:px-[22px]">
            <FileFacts file={file} />
            <span className="ml-auto flex flex-wrap gap-2">
              {onWithdraw !== undefined && file.withdrawn === null && (
                <Button kind="danger" className={WIDE} onClick={onWithdraw}>
                  Withdraw
                </Button>
              )}
              {files.length > 1 && (
                <>
                  <Button className={WIDE} onClick={() => step(-1)}>
                    Previous
                  </Button>
                  <Button className={WIDE} onClick={() => step(1)}>
                    Next
                  </Button>
                </>
              )}
            </span>
          </footer>
        </RadixDialog.Content>
      </RadixDialog.Portal>
    </RadixDialog.Root>
  )
}

function Shown({ file }: { file: Attachment }) {
  const { site } = useSite()
  const address = fileAddress(site.id, file)
  if (file.kind === 'photo') {
    return (
      <div className="flex min-h-0 flex-1 items-center justify-center bg-film">
        <img key={file.id} src={address} alt={fileTitle(file)} width={file.width ?? undefined} height={file.height ?? undefined} className="h-auto max-h-full w-auto max-w-full object-contain" />
      </div>
    )
  }
  return (
    <div className="flex min-h-0 flex-1 flex-col items-center justify-center gap-4 bg-film px-4 text-center">
      <p className="m-0 break-words">
        <b className="block text-question font-extrabold">PDF document</b>
        {file.fileName}, {fileSize(file.bytes)}
      </p>
      <a href={address} download={file.fileName} className={buttonClasses('primary', 'touch')}>
        Save the document
      </a>
    </div>
  )
}

function FileFacts({ file }: { file: Attachment }): ReactNode {
  const { units } = useSite()
  return (
    <p className="m-0 min-w-0 text-small text-ink-2">
      {file.withdrawn !== null && (
        <b className="block font-semibold text-bad">
          Withdrawn {units.dateTime(file.withdrawn.at)} by {file.withdrawn.by}: {file.withdrawn.reason}
        </b>
      )}
      {file.addedBy.name}, {whenWords(file, units)}
      {file.takenFrom === 'camera' && ' by the camera’s clock'}. {file.fileName}, {fileSize(file.bytes)}, SHA-256 <span className="num">{shortHash(file.sha256)}</span>
    </p>
  )
}
