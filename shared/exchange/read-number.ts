export type DecimalMark = '.' | ','

const GROUPED: Readonly<Record<DecimalMark, RegExp>> = {
  '.': /^[+-]?(\d{1,3}(,\d{3})+|\d+)?(\.\d*)?(e[+-]?\d{1,3})?$/i,
  ',': /^[+-]?(\d{1,3}(\.\d{3})+|\d+)?(,\d*)?(e[+-]?\d{1,3})?$/i,
}

/**
 * A number as a file writes it.
 * @param text digits with the decimal mark, thousands by the other mark or by blanks; an exponent and a true minus are taken
 * @param mark the file's decimal mark
 * @returns the number, or undefined where the text is none
 */
export function readNumber(text: string, mark: DecimalMark): number | undefined {
  const bare = text.replace(/[\s\u00a0\u2009\u202f]/g, '').replace(/^\u2212/, '-')
  if (!/\d/.test(bare) || !GROUPED[mark].test(bare)) return undefined
  const plain = mark === '.' ? bare.replaceAll(',', '') : bare.replaceAll('.', '').replace(',', '.')
  const value = Number(plain)
  return Number.isFinite(value) ? value : undefined
}

/**
 * The decimal mark a column of figures is written with.
 * @param texts cells of columns that hold numbers
 * @returns null where none of them tells: "1,234" may be either
 */
export function guessDecimalMark(texts: readonly string[]): DecimalMark | null {
  const bare = texts.map((text) => text.trim())
  // a comma that no three digits follow, or one behind a point
  const commas = bare.filter((text) => /^[+\-\u2212]?[\d. ]*,(\d{1,2}|\d{4,})$/.test(text) || /^[+\-\u2212]?0,\d+$/.test(text)).length
  const points = bare.filter((text) => /^[+\-\u2212]?[\d, ]*\.(\d{1,2}|\d{4,})(e.*)?$/i.test(text) || /^[+\-\u2212]?0\.\d+/.test(text)).length
  if (commas > points) return ','
  if (points > 0) return '.'
  return bare.some((text) => /^\D?\d{1,3}([.,]\d{3})+$/.test(text)) ? null : '.'
}
