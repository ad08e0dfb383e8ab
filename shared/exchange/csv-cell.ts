/** What makes a spreadsheet take a text for a formula, behind any number of apostrophes that were set before it already. */
const LOOKS_LIKE_FORMULA = /^'*[=+\-@\t\r\n]/

/** A text that a spreadsheet would run as a formula gets an apostrophe before it; {@link unguardText} takes it off again, so that every text comes back as it was. */
export function guardText(text: string): string {
  return LOOKS_LIKE_FORMULA.test(text) ? `'${text}` : text
}

/** The reverse of {@link guardText}. */
export function unguardText(text: string): string {
  return text.startsWith("'") && LOOKS_LIKE_FORMULA.test(text.slice(1)) ? text.slice(1) : text
}

/** A field of a CSV line (RFC 4180): quoted where it holds a mark of the format, or blanks at an end. */
export function csvField(text: string): string {
  return /[",;\t\r\n]|^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}

/** One line of a CSV file with its line end. */
export function csvLine(fields: readonly string[]): string {
  return `${fields.map(csvField).join(',')}\r\n`
}

/** How the lines begin that say where a file comes from; the first of them tells that the others are such. */
export const PROVENANCE = '# '
export const PROVENANCE_TITLE = '# Hardpan test results'

/** Lines at the head of a file that tell where it comes from, of rows as they were read. */
export function provenanceLines(rows: readonly (readonly string[])[]): number {
  if (rows[0]?.[0]?.startsWith(PROVENANCE_TITLE) !== true) return 0
  const end = rows.findIndex((row) => row[0]?.startsWith(PROVENANCE) !== true)
  return end === -1 ? rows.length : end
}
