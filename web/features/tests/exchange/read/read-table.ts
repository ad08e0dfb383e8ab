import { EXCHANGE_LIMITS } from '#shared/schemas/test-exchange.ts'
import { decodeText } from './decode-text.ts'
import { readCsv } from './read-csv.ts'

/** A file or a pasted block as lines of fields, or why it cannot be one. */
export type ReadTable =
  | {
      readonly ok: true
      readonly name: string
      /** of the bytes as they came, hex */
      readonly sha256: string
      readonly rows: readonly (readonly string[])[]
      /** what is worth knowing about how it was read */
      readonly notices: readonly string[]
    }
  | { readonly ok: false; readonly message: string }

export type ReadRows = { readonly ok: true; readonly rows: readonly (readonly string[])[]; readonly notices: readonly string[] } | { readonly ok: false; readonly message: string }

const MB = 1024 * 1024
const hex = (bytes: ArrayBuffer): string => [...new Uint8Array(bytes)].map((byte) => byte.toString(16).padStart(2, '0')).join('')

/** Signatures of files that people take for tables. */
const NO_TABLE: readonly (readonly [readonly number[], string])[] = [
  [[0xd0, 0xcf, 0x11, 0xe0], 'This is a workbook of the old kind (.xls). Save it as .xlsx or CSV and choose it again.'],
  [[0x25, 0x50, 0x44, 0x46], 'This is a PDF, which holds no table that can be read. Export the results as CSV or .xlsx.'],
  [[0x89, 0x50, 0x4e, 0x47], 'This is a picture. Export the results as CSV or .xlsx.'],
  [[0xff, 0xd8, 0xff], 'This is a picture. Export the results as CSV or .xlsx.'],
]
const ZIP = [0x50, 0x4b] as const
const startsWith = (bytes: Uint8Array, signature: readonly number[]): boolean => signature.every((byte, index) => bytes[index] === byte)

/** Reads a file by what it holds, whatever its name says; bounded in bytes, lines and fields. */
export async function readTable(bytes: Uint8Array, name: string): Promise<ReadTable> {
  if (bytes.length === 0) return { ok: false, message: 'There is nothing in this file.' }
  if (bytes.length > EXCHANGE_LIMITS.fileBytes) return { ok: false, message: `This file is larger than ${EXCHANGE_LIMITS.fileBytes / MB} MB. Split it and take the parts in one after another.` }
  const other = NO_TABLE.find(([signature]) => startsWith(bytes, signature))
  if (other) return { ok: false, message: other[1] }
  const read = startsWith(bytes, ZIP) ? await (await import('./read-workbook.ts')).readWorkbook(bytes) : readText(bytes)
  if (!read.ok) return read
  const problem = boundsProblem(read.rows)
  if (problem !== undefined) return { ok: false, message: problem }
  return { ok: true, name, sha256: hex(await crypto.subtle.digest('SHA-256', new Uint8Array(bytes))), rows: read.rows, notices: read.notices }
}

function readText(bytes: Uint8Array): ReadRows {
  const decoded = decodeText(bytes)
  if (!decoded.ok) return decoded
  const read = readCsv(decoded.text)
  return read.ok ? { ...read, notices: [...decoded.notices, ...read.notices] } : read
}

/** Lines above the heads of the columns, and the heads themselves, beside the rows that are counted. */
const ABOVE = 20

function boundsProblem(rows: readonly (readonly string[])[]): string | undefined {
  if (rows.length < 2) return 'There is only one line in this. A table has a line of heads and a line for each test.'
  if (rows.length > EXCHANGE_LIMITS.rows + ABOVE) return `There are more than ${EXCHANGE_LIMITS.rows.toLocaleString('en-US')} lines in this. Split it and take the parts in one after another.`
  return undefined
}
