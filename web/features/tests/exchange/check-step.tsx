import { useState } from 'react'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { ProgressBar } from '#web/components/ui/progress-bar.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { DoneStep } from './done-step.tsx'
import { problemsOf, stateOf, type LineState } from './import-lines.ts'
import { LineList } from './line-list.tsx'
import { LineFilter } from './line-filter.tsx'
import { asideCsv, saveText } from './save-file.ts'
import { useAccepting } from './use-accepting.ts'
import type { Importing, OpenImport } from './use-import.ts'
import { usePreviews } from './use-previews.ts'

const rowsWord = (count: number): string => `${count.toLocaleString('en-US')} ${count === 1 ? 'row' : 'rows'}`

/** Every row with its verdict or with what is wrong; accepted together once each is ready or set aside. */
export function CheckStep({ importing, open }: { importing: Importing; open: OpenImport }) {
  const { site } = useSite()
  const { lines } = importing
  const previews = usePreviews(site.id, lines)
  const accepting = useAccepting()
  const [shown, setShown] = useState<LineState | 'all'>('all')
  const [done, setDone] = useState(false)
  const looked = lines.map((line) => {
    const previewed = previews.previewOf(line)
    return { line, previewed, state: stateOf(line, previewed), problems: problemsOf(line, previewed) }
  })
  const count = (state: LineState): number => looked.filter((each) => each.state === state).length
  const aside = lines.filter((line) => line.aside !== null)
  const unsettledCount = count('attention') + count('differs') + count('waiting')
  const ready = looked.flatMap(({ state, line: { row } }) => (state === 'ready' && row !== null ? [row] : []))
  const unsettled = looked.filter(({ state }) => state === 'attention' || state === 'differs')

  const handleAccept = async (): Promise<void> => {
    const { name, sha256 } = open.table
    const setAside = aside.map(({ line, aside: reason }) => ({ line, reason: (reason ?? '').slice(0, 200) }))
    const whole = await accepting.accept({ siteId: site.id, file: { name, sha256, rows: lines.length }, rows: ready, setAside })
    if (!whole) {
      previews.ask()
      return
    }
    importing.finish()
    setDone(true)
  }
  const saveAside = (): void => saveText('set-aside.csv', asideCsv(open.table.rows[open.settings.headLine] ?? [], aside))

  if (done && accepting.accepted !== null) {
    return <DoneStep accepted={accepting.accepted} already={count('recorded')} aside={aside.length} onSaveAside={saveAside} onFinish={importing.forget} />
  }
  return (
    <div>
      {previews.error !== null && (
        <Banner tone="bad" title="The rows could not be checked." className="mb-3" action={<button type="button" onClick={previews.retry}>Try again</button>}>
          {previews.error.message} Your corrections are kept.
        </Banner>
      )}
      {accepting.error !== null && (
        <Banner tone="bad" title={accepting.accepted === null ? 'Nothing was recorded.' : `${rowsWord(accepting.accepted.recorded.length)} were recorded, the rest was not.`} className="mb-3">
          {accepting.error.message} The rows are checked again; your corrections are kept.
        </Banner>
      )}
      {previews.checked < previews.total && <ProgressBar label="Checking the rows" done={previews.checked} total={previews.total} of="rows" />}
      {accepting.progress !== null && <ProgressBar label="Recording the tests" {...accepting.progress} of="tests" />}
      <LineFilter shown={shown} count={count} total={lines.length} onShow={setShown} />
      <LineList looked={shown === 'all' ? looked : looked.filter(({ state }) => state === shown)} importing={importing} />
      <div className="bottom-0 flex flex-wrap items-center gap-[10px] border-t border-ink bg-raised py-3 pb-4 md:sticky">
        <Button kind="primary" disabled={unsettledCount > 0 || ready.length === 0 || accepting.progress !== null} busyLabel={accepting.progress !== null && 'Recording'} onClick={() => void handleAccept()} className="pointer-coarse:min-h-12">
          {ready.length === 0 ? 'Record the tests' : `Record ${ready.length.toLocaleString('en-US')} ${ready.length === 1 ? 'test' : 'tests'}`}
        </Button>
        <Button onClick={importing.back} disabled={accepting.progress !== null} className="pointer-coarse:min-h-12">
          Back to the columns
        </Button>
        {unsettled.length > 1 && count('waiting') === 0 && (
          <Button onClick={() => importing.setAside(unsettled.map(({ line }) => line.line), unsettled[0]?.problems[0]?.message ?? 'Needs a look')} className="pointer-coarse:min-h-12">
            Set {unsettled.length} aside
          </Button>
        )}
        {aside.length > 0 && (
          <Button kind="quiet" onClick={saveAside} className="pointer-coarse:min-h-12">
            Save what is set aside
          </Button>
        )}
        <span role="status" className="text-ink-2">
          {statusWords(unsettledCount, ready.length, count('waiting'))}
        </span>
      </div>
    </div>
  )
}

function statusWords(unsettled: number, ready: number, waiting: number): string {
  if (waiting > 0) return `${rowsWord(waiting)} still to check.`
  if (unsettled > 0) return `${rowsWord(unsettled)} to correct or set aside. Nothing is stored before that.`
  return ready === 0 ? 'There is nothing new in this file.' : 'All rows are settled.'
}
