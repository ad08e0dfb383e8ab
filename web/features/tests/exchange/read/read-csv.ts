import Papa from 'papaparse'
import { PROVENANCE, unguardText } from '#shared/exchange/csv-cell.ts'
import { EXCHANGE_LIMITS } from '#shared/schemas/test-exchange.ts'
import type { ReadRows } from './read-table.ts'

const MARKS = ['\t', ';', ','] as const
/** Lines looked at for the mark between fields. */
const LOOKED_AT = 30

/** The mark between fields: the one that cuts the first lines into most fields, evenly; a pasted block has tabs. */
export function guessDelimiter(text: string): string {
  const lines = text
    .slice(0, 65_536)
    .split(/\r?\n/)
    .filter((line) => line.trim() !== '' && !line.replace(/^["\ufeff]+/, '').startsWith(PROVENANCE))
    .slice(0, LOOKED_AT)
  const counted = MARKS.map((mark) => ({ mark, fields: Math.max(...lines.map((line) => fieldsOf(line, mark)), 1) }))
  return counted.reduce((best, each) => (each.fields > best.fields ? each : best)).mark
}

function fieldsOf(line: string, mark: string): number {
  return line.replace(/"[^"]*"/g, '').split(mark).length
}

/** Lines of a CSV text (RFC 4180; commas, semicolons or tabs), blank ones left out, and nothing of more fields than a table has. */
export function readCsv(text: string): ReadRows {
  const rows: string[][] = []
  let problem: string | undefined
  const most = EXCHANGE_LIMITS.rows + LOOKED_AT
  Papa.parse<string[]>(text.replace(/^\ufeff/, ''), {
    delimiter: guessDelimiter(text),
    skipEmptyLines: false,
    step: ({ data, errors }, parser) => {
      if (data.length > EXCHANGE_LIMITS.columns) problem = `A line of this has more than ${EXCHANGE_LIMITS.columns} fields, which is no table of tests.`
      else if (errors.some(({ code }) => code === 'MissingQuotes')) problem = `From line ${rows.length + 1} on a quotation mark is never closed. Correct it in the file and choose it again.`
      else rows.push(data.map(unguardText))
      if (problem !== undefined || rows.length > most) parser.abort()
    },
  })
  if (problem !== undefined) return { ok: false, message: problem }
  while (rows.at(-1)?.every((field) => field.trim() === '') === true) rows.pop()
  return { ok: true, rows, notices: [] }
}
