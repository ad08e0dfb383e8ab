import { useMemo, useState } from 'react'
import type { ReadRow } from '#shared/exchange/read-row.ts'
import { columnOf, type ColumnKey } from '#shared/exchange/test-columns.ts'
import { plainWord } from '#shared/exchange/exchange-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { openSettings, readOptionsOf, type FileSettings } from './file-settings.ts'
import { NO_WORK, readLines, type ImportLine, type LineWork } from './import-lines.ts'
import { keepHabits, keepWork, readHabits, readWork, type ImportWork } from './keep-import.ts'
import type { ReadTable } from './read/read-table.ts'
import { rowIds } from './row-ids.ts'

export type Table = Extract<ReadTable, { ok: true }>

export interface OpenImport {
  readonly table: Table
  readonly ids: readonly string[]
  readonly settings: FileSettings
  readonly work: LineWork
  /** the columns are settled, the rows are being looked at */
  readonly checking: boolean
}

const SURE = { decimal: true, dateOrder: true }

/** A file from its choice to its last row: kept on this device until it is done. */
export function useImport(userId: string) {
  const { site } = useSite()
  const [open, setOpen] = useState<OpenImport | null>(null)
  const [kept, setKept] = useState<ImportWork | null>(() => readWork(userId, site.id))
  const [known] = useState(() => new Map<string, ReadRow>())

  const set = (next: OpenImport): void => {
    setOpen(next)
    const { table, settings, work } = next
    keepWork(userId, site.id, { sha256: table.sha256, name: table.name, rows: table.rows.map((row) => [...row]), settings: { ...settings, columns: [...settings.columns] }, edits: work.edits as ImportWork['edits'], aside: work.aside as ImportWork['aside'], another: [...work.another] })
  }
  /** Takes a table in; what was done to the same file before is taken up again. */
  const start = async (table: Table): Promise<void> => {
    const ids = await rowIds(site.id, table.rows)
    const same = kept !== null && kept.sha256 === table.sha256 ? kept : null
    known.clear()
    setKept(null)
    set({
      table,
      ids,
      settings: same === null ? openSettings(table.rows, site, readHabits(userId)) : { ...same.settings, sure: SURE },
      work: same === null ? NO_WORK : { edits: same.edits as LineWork['edits'], aside: same.aside as LineWork['aside'], another: same.another },
      checking: false,
    })
  }
  const change = (part: Partial<OpenImport>): void => {
    if (open !== null) set({ ...open, ...part })
  }
  const forget = (): void => {
    keepWork(userId, site.id, null)
    setKept(null)
    setOpen(null)
  }
  const lines = useMemo<ImportLine[]>(() => (open?.checking === true ? readLines(open.table.rows, open.ids, open.settings, readOptionsOf(open.table.rows, open.settings, site), open.work, known) : []), [open, site, known])

  return {
    open,
    kept,
    lines,
    start,
    /** goes on with what was kept on this device */
    resume: () => (kept !== null && kept.rows !== null ? start({ ok: true, name: kept.name, sha256: kept.sha256, rows: kept.rows, notices: [] }) : Promise.resolve()),
    settle: (settings: Partial<FileSettings>) => open !== null && change({ settings: { ...open.settings, ...settings } }),
    headAt: (headLine: number) => open !== null && change({ settings: openSettings(open.table.rows, site, readHabits(userId), headLine) }),
    check: () => {
      if (open === null) return
      keepHabits(userId, habitsOf(open))
      change({ checking: true })
    },
    back: () => change({ checking: false }),
    edit: (line: number, key: ColumnKey, text: string) => open !== null && change({ work: { ...open.work, edits: { ...open.work.edits, [line]: { ...open.work.edits[line], [key]: text } } } }),
    setAside: (which: readonly number[], reason: string | null) => {
      if (open === null) return
      const aside = { ...open.work.aside }
      for (const line of which) {
        if (reason === null) delete aside[line]
        else aside[line] = reason
      }
      change({ work: { ...open.work, aside } })
    },
    sayAnother: (line: number) => open !== null && change({ work: { ...open.work, another: [...open.work.another, line] } }),
    /** nothing of it needs to be kept any more */
    finish: () => keepWork(userId, site.id, null),
    forget,
  }
}

export type Importing = ReturnType<typeof useImport>

/** What to remember for the next file: heads that had to be told, units, and what the file did not say. */
function habitsOf({ table, settings }: OpenImport) {
  const heads = (table.rows[settings.headLine] ?? []).flatMap((head, index) => {
    const key = settings.columns[index] ?? null
    const name = plainWord(head)
    return name === '' || (key !== null && plainWord(columnOf(key).label) === name) ? [] : [[name, key] as const]
  })
  const { fixed, groupUnits } = settings
  const { plan: _plan, ...units } = groupUnits
  return { heads: Object.fromEntries(heads), units, fixed: { ...fixed, lift: '' } }
}
