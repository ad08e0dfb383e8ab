const LONGEST = 120

/** Control characters, and the marks that turn the direction of writing (which make "exe.jpg" of "gpj.exe"). */
const UNSEEN = /[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu

/**
 * A file's name as it was given, without folders, characters that cannot be seen, and what file systems refuse. Cut to 120
 * characters, the ending kept. An empty one becomes `otherwise`.
 */
export function cleanFileName(given: string, otherwise: string): string {
  const base = given.normalize('NFC').split(/[\\/]/).at(-1) ?? ''
  const plain = base.replace(UNSEEN, '').replace(/[<>:"|?*]/g, '_').replace(/\s+/g, ' ').replace(/^[. ]+|[. ]+$/g, '')
  if (plain === '') return otherwise
  const characters = [...plain]
  if (characters.length <= LONGEST) return plain
  const ending = /\.[A-Za-z0-9]{1,8}$/.exec(plain)?.[0] ?? ''
  return characters.slice(0, LONGEST - ending.length).join('') + ending
}

/** The name with the ending its content has: what was a PNG is kept, and handed out, as a JPEG. */
export function nameWithEnding(name: string, ending: string): string {
  return `${name.replace(/\.[A-Za-z0-9]{1,8}$/, '')}.${ending}`
}
