import { useState, type FormEvent } from 'react'
import type { SavedView } from '#shared/schemas/saved-view.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextField } from '#web/components/ui/text-fields.tsx'
import { useChooseDefaultView, useEditView, useRemoveView } from '#web/data/view/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** Renames, shares and removes views, and says which one Results opens with. */
export function ViewsDialog({ views, onClose }: { views: readonly SavedView[]; onClose: () => void }) {
  const { site } = useSite()
  const editing = useEditView(site.id, { saysOwnErrors: true })
  const removing = useRemoveView(site.id, { saysOwnErrors: true })
  const choosing = useChooseDefaultView(site.id, { saysOwnErrors: true })
  const error = editing.error ?? removing.error ?? choosing.error
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Views of the register"
      actions={
        <DialogClose>
          <Button size="touch">Done</Button>
        </DialogClose>
      }
    >
      {error !== null && (
        <Banner tone="bad" title="Not changed." className="mb-3">
          {error.message}
        </Banner>
      )}
      {views.length === 0 && <p className="m-0 text-ink-2">No view is kept any more.</p>}
      <ul aria-label="Views" className="m-0 list-none border-t border-ink p-0 empty:hidden">
        {views.map((view) => (
          <ViewLine
            key={view.id}
            view={view}
            onRename={(name) => editing.mutate({ id: view.id, name })}
            onShare={(shared) => editing.mutate({ id: view.id, shared })}
            onFirst={(first) => choosing.mutate({ viewId: first ? view.id : null })}
            onRemove={() => removing.mutate(view.id)}
          />
        ))}
      </ul>
    </Dialog>
  )
}

type ViewLineProps = { view: SavedView; onRename: (name: string) => void; onShare: (shared: boolean) => void; onFirst: (first: boolean) => void; onRemove: () => void }

function ViewLine({ view, onRename, onShare, onFirst, onRemove }: ViewLineProps) {
  const { can } = useSite()
  const [doing, setDoing] = useState<'rename' | 'remove' | null>(null)
  const box = 'flex min-h-9 items-center gap-2 pointer-coarse:min-h-12'
  return (
    <li className="border-b border-rule py-2">
      <div className="flex flex-wrap items-center gap-x-3">
        <b className="min-w-0 flex-1 font-semibold">{view.name}</b>
        {view.mayEdit && doing === null && (
          <>
            <Button kind="quiet" className="pointer-coarse:min-h-12" onClick={() => setDoing('rename')}>
              Rename<span className="sr-only"> {view.name}</span>
            </Button>
            <Button kind="quiet" className="pointer-coarse:min-h-12" onClick={() => setDoing('remove')}>
              Remove<span className="sr-only"> {view.name}</span>
            </Button>
          </>
        )}
      </div>
      {doing === 'rename' && <RenameForm name={view.name} onRename={onRename} onDone={() => setDoing(null)} />}
      {doing === 'remove' && (
        <div className="my-1 flex flex-wrap items-center gap-2">
          <span className="text-ink-2">{view.shared ? 'It goes for everybody; the results stay.' : 'It goes for good; the results stay.'}</span>
          <Button kind="danger" className="pointer-coarse:min-h-12" onClick={onRemove}>
            Remove {view.name}
          </Button>
          <Button className="pointer-coarse:min-h-12" onClick={() => setDoing(null)}>
            Keep it
          </Button>
        </div>
      )}
      <div className="flex flex-wrap gap-x-5 text-small">
        <label className={box}>
          <input type="checkbox" className="size-[18px] accent-ink" checked={view.isDefault} onChange={(event) => onFirst(event.target.checked)} />
          Results opens with it
        </label>
        {view.mayEdit && (view.shared || can('view.share')) ? (
          <label className={box}>
            <input type="checkbox" className="size-[18px] accent-ink" checked={view.shared} onChange={(event) => onShare(event.target.checked)} />
            Everybody sees it
          </label>
        ) : (
          <span className={`${box} text-ink-2`}>{view.shared ? `Shared by ${view.author.name}` : 'Yours alone'}</span>
        )}
      </div>
    </li>
  )
}

function RenameForm({ name, onRename, onDone }: { name: string; onRename: (name: string) => void; onDone: () => void }) {
  const [text, setText] = useState(name)
  const handleSubmit = (event: FormEvent): void => {
    event.preventDefault()
    const next = text.trim()
    if (next === '') return
    if (next !== name) onRename(next)
    onDone()
  }
  return (
    <form onSubmit={handleSubmit} className="my-1 flex flex-wrap items-end gap-2">
      <TextField label="New name" maxLength={80} autoFocus autoComplete="off" className="min-w-40 flex-1" value={text} error={text.trim() === '' ? 'Give a name' : undefined} onChange={(event) => setText(event.target.value)} />
      <Button type="submit" kind="primary" className="min-h-[38px] pointer-coarse:min-h-12">
        Rename
      </Button>
      <Button className="min-h-[38px] pointer-coarse:min-h-12" onClick={onDone}>
        Cancel
      </Button>
    </form>
  )
}
