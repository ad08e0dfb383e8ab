/** Characters that a workbook's XML cannot hold, and texts that look as if they were such a character written out. */
const UNHELD = /[\u0000-\u0008\u000b\u000c\r\u000e-\u001f\u007f\ufffe\uffff]|_(?=x[0-9A-Fa-f]{4}_)/g

/** A text as a workbook keeps it: a character its XML cannot hold as _xHHHH_ (ECMA-376 part 1, 22.9.2.19, ST_Xstring);
 * readers of workbooks give it back as it was. */
export function workbookText(text: string): string {
  return text.replace(UNHELD, (character) => `_x${character.charCodeAt(0).toString(16).toUpperCase().padStart(4, '0')}_`)
}
