type Decoded = { readonly ok: true; readonly text: string; readonly notices: readonly string[] } | { readonly ok: false; readonly message: string }

/** Bytes looked at for signs of UTF-16 without its mark. */
const LOOKED_AT = 4_096

/** The text of a file: UTF-8, or UTF-16 by its mark; else as older spreadsheets in the West wrote it, which is said. */
export function decodeText(bytes: Uint8Array): Decoded {
  const [first, second] = bytes
  const marked = first === 0xff && second === 0xfe ? 'utf-16le' : first === 0xfe && second === 0xff ? 'utf-16be' : null
  if (marked !== null) return textOf(new TextDecoder(marked).decode(bytes), [])
  const zeros = bytes.subarray(0, LOOKED_AT).filter((byte) => byte === 0).length
  if (zeros > Math.min(bytes.length, LOOKED_AT) / 4) return { ok: false, message: 'The letters of this file are written in a way that is not told (UTF-16 without its mark?). Save it as CSV UTF-8 and choose it again.' }
  try {
    return textOf(new TextDecoder('utf-8', { fatal: true }).decode(bytes), [])
  } catch {
    return textOf(new TextDecoder('windows-1252').decode(bytes), ['This file is not UTF-8. It was read as Western European: look whether accents and signs such as ° and ³ are right.'])
  }
}

function textOf(text: string, notices: readonly string[]): Decoded {
  // control characters, by number
  const odd = [...text.slice(0, 65_536)].filter((character) => character.charCodeAt(0) < 9 || (character.charCodeAt(0) > 13 && character.charCodeAt(0) < 32)).length
  if (text.includes('\0') || odd > 8) return { ok: false, message: 'This is no text file. Choose a CSV file or a workbook (.xlsx).' }
  return { ok: true, text, notices }
}
