import { useState } from 'react'
import type { PreviewedRow, RowProblem } from '#shared/schemas/test-exchange.ts'
import { Button } from '#web/components/ui/button.tsx'
import type { ImportLine, LineState } from './import-lines.ts'
import { LineItem } from './line-item.tsx'
import type { Importing } from './use-import.ts'

const PAGE = 50

export interface LookedLine {
  readonly line: ImportLine
  readonly previewed: PreviewedRow | undefined
  readonly state: LineState
  readonly problems: readonly RowProblem[]
}

/** The rows, a page at a time. */
export function LineList({ looked, importing }: { looked: readonly LookedLine[]; importing: Importing }) {
  const [page, setPage] = useState(0)
  const pages = Math.max(1, Math.ceil(looked.length / PAGE))
  const at = Math.min(page, pages - 1)
  return (
    <>
      {looked.length === 0 && <p className="my-6 text-ink-2">No row stands like this.</p>}
      <ol aria-label="Rows of the file" className="m-0 list-none p-0">
        {looked.slice(at * PAGE, (at + 1) * PAGE).map((each) => (
          <LineItem key={each.line.line} looked={each} importing={importing} />
        ))}
      </ol>
      {pages > 1 && (
        <nav aria-label="Pages of rows" className="mt-3 mb-4 flex flex-wrap items-center gap-3">
          <Button disabled={at === 0} onClick={() => setPage(at - 1)} className="pointer-coarse:min-h-12">
            Earlier
          </Button>
          <Button disabled={at >= pages - 1} onClick={() => setPage(at + 1)} className="pointer-coarse:min-h-12">
            Later
          </Button>
          <span className="text-ink-2">
            {(at * PAGE + 1).toLocaleString('en-US')} to {Math.min((at + 1) * PAGE, looked.length).toLocaleString('en-US')} of {looked.length.toLocaleString('en-US')}
          </span>
        </nav>
      )}
    </>
  )
}
