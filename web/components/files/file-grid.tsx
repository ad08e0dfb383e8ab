import type { Attachment } from '#shared/schemas/attachment.ts'
import { thumbnailAddress } from '#web/data/attachment/queries.ts'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { fileSize, fileTitle, whenWords } from './file-words.ts'

/** The files of a record as small pictures; each opens large. */
export function FileGrid({ files, onOpen }: { files: readonly Attachment[]; onOpen: (id: string) => void }) {
  const { units } = useSite()
  return (
    <ul className="m-0 mb-3 grid list-none grid-cols-[repeat(auto-fill,minmax(136px,1fr))] gap-x-3 gap-y-4 p-0 print:hidden">
      {files.map((file) => (
        <li key={file.id} className="min-w-0">
          <button type="button" className="block w-full text-left" aria-label={`Open ${fileTitle(file)}${file.withdrawn === null ? '' : ', withdrawn'}`} onClick={() => onOpen(file.id)}>
            <Tile file={file} />
            <span className={classNames('mt-[6px] line-clamp-2 block font-medium break-words', file.withdrawn !== null && 'line-through')}>{fileTitle(file)}</span>
          </button>
          <p className="m-0 text-small text-ink-2">
            {file.addedBy.name}, {whenWords(file, units)}
          </p>
          {file.withdrawn !== null && <p className="m-0 text-small font-medium text-bad">Withdrawn: {file.withdrawn.reason}</p>}
        </li>
      ))}
    </ul>
  )
}

function Tile({ file }: { file: Attachment }) {
  const { site } = useSite()
  const frame = classNames('aspect-[4/3] w-full border border-rule-2 bg-film', file.withdrawn !== null && 'opacity-45')
  if (file.kind === 'photo') return <img src={thumbnailAddress(site.id, file)} alt="" loading="lazy" decoding="async" className={classNames(frame, 'object-cover')} />
  return (
    <span className={classNames(frame, 'flex flex-col items-center justify-center')}>
      <b className="text-value font-extrabold">PDF</b>
      <span className="num text-small text-ink-2">{fileSize(file.bytes)}</span>
    </span>
  )
}

/** The same on paper: what belongs to the record, each by the hash the audit trail holds. */
export function PrintedFiles({ files, hashOf }: { files: readonly Attachment[]; hashOf: (sha256: string) => string }) {
  const { units } = useSite()
  return (
    <ol className="m-0 hidden list-none p-0 print:block">
      {files
        .filter((file) => file.withdrawn === null)
        .map((file) => (
          <li key={file.id} className="border-b border-rule py-1">
            {fileTitle(file)}
            {file.caption !== '' && <span className="text-ink-2"> ({file.fileName})</span>}, {whenWords(file, units)}, SHA-256 <span className="num">{hashOf(file.sha256)}</span>
          </li>
        ))}
    </ol>
  )
}
