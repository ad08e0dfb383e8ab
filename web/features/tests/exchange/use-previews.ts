import { useCallback, useEffect, useMemo, useRef, useState } from 'react'
import { inHappenedOrder } from '#shared/exchange/happened-order.ts'
import { EXCHANGE_LIMITS, type ImportRow, type PreviewedRow } from '#shared/schemas/test-exchange.ts'
import { previewImport } from '#web/data/test/import-mutations.ts'
import { followedBy, type ImportLine } from './import-lines.ts'

/** Asks the server about every row that may be recorded, part by part; a changed row, and what follows it, is asked about anew. */
export function usePreviews(siteId: string, lines: readonly ImportLine[]) {
  const [known, setKnown] = useState<ReadonlyMap<string, PreviewedRow>>(new Map())
  const [error, setError] = useState<Error | null>(null)
  const busy = useRef(false)
  const { keys, rows, byId } = useMemo(() => askable(lines), [lines])
  const waiting = useMemo(() => rows.filter((row) => !known.has(keys.get(row) ?? '')), [rows, keys, known])

  useEffect(() => {
    if (busy.current || error !== null || waiting.length === 0) return
    const abort = new AbortController()
    const part = nextPart(waiting, byId)
    busy.current = true
    previewImport(siteId, part, abort.signal)
      .then((answers) => {
        const said = new Map(answers.map((answer) => [answer.line, answer]))
        setKnown((before) => new Map([...before, ...part.rows.flatMap((row) => (said.has(row.line) ? [[keys.get(row) ?? '', said.get(row.line)] as [string, PreviewedRow]] : []))]))
      })
      .catch((reason: unknown) => {
        if (!abort.signal.aborted) setError(reason instanceof Error ? reason : new Error('The rows could not be checked.'))
      })
      .finally(() => {
        busy.current = false
      })
    return () => {
      abort.abort()
      busy.current = false
    }
  }, [siteId, waiting, byId, keys, error])

  const previewOf = useCallback((line: ImportLine) => (line.row === null || line.aside !== null ? undefined : known.get(keys.get(line.row) ?? '')), [known, keys])
  return {
    previewOf,
    checked: rows.length - waiting.length,
    total: rows.length,
    error,
    retry: () => setError(null),
    /** forget what was said: the site has changed */
    ask: () => setKnown(new Map()),
  }
}

function askable(lines: readonly ImportLine[]) {
  const rows = lines.flatMap(({ row, aside }) => (row === null || aside !== null ? [] : [row]))
  const byId = new Map(rows.map((row) => [row.test.id, row]))
  const own = new Map(rows.map((row) => [row, JSON.stringify(row)]))
  const keys = new Map(rows.map((row) => [row, [row, ...followedBy(row, byId)].map((each) => own.get(each) ?? '').join('\n')]))
  return { rows: inHappenedOrder(rows), byId, keys }
}

/** The next rows to ask about, with what they follow outside of them, as far as there is room. */
function nextPart(waiting: readonly ImportRow[], byId: ReadonlyMap<string, ImportRow>): { rows: ImportRow[]; context: ImportRow[] } {
  const rows: ImportRow[] = []
  let context: ImportRow[] = []
  for (const row of waiting.slice(0, EXCHANGE_LIMITS.previewRows)) {
    const wanted = [...new Set([...context, ...followedBy(row, byId)])]
    if (rows.length > 0 && wanted.length > EXCHANGE_LIMITS.contextRows) break
    rows.push(row)
    context = wanted.slice(0, EXCHANGE_LIMITS.contextRows)
  }
  return { rows, context: context.filter((row) => !rows.includes(row)) }
}
