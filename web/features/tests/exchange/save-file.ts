import { csvLine, guardText } from '#shared/exchange/csv-cell.ts'
import type { ImportLine } from './import-lines.ts'

/** Gives the person a text as a file to save. */
export function saveText(name: string, text: string): void {
  const address = URL.createObjectURL(new Blob(['\ufeff', text], { type: 'text/csv;charset=utf-8' }))
  const link = document.createElement('a')
  link.href = address
  link.download = name
  link.click()
  setTimeout(() => URL.revokeObjectURL(address), 10_000)
}

/** Lines that were set aside, as they stood in their file, each with its line and the reason: nothing of a file gets lost. */
export function asideCsv(heads: readonly string[], lines: readonly ImportLine[]): string {
  const width = Math.max(heads.length, ...lines.map(({ fields }) => fields.length))
  const full = (fields: readonly string[]) => Array.from({ length: width }, (_, index) => guardText(fields[index] ?? ''))
  return csvLine([...full(heads), 'Line', 'Set aside because']) + lines.map(({ fields, line, aside }) => csvLine([...full(fields), String(line), guardText(aside ?? '')])).join('')
}
