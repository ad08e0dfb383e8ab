import fc from 'fast-check'
import { expect, test } from 'vitest'
import { cleanFileName, nameWithEnding } from '#api/files/clean-file-name.ts'

test.each([
  ['hole.jpg', 'hole.jpg'],
  ['C:\\Users\\me\\hole.jpg', 'hole.jpg'],
  ['/etc/../hole.jpg', 'hole.jpg'],
  ['a\u0000b\r\nc.jpg', 'abc.jpg'],
  ['invoice\u202egpj.exe', 'invoicegpj.exe'],
  ['  ..  ', 'photo'],
  ['', 'photo'],
  ['Отчёт 7.pdf', 'Отчёт 7.pdf'],
  ['what?.pdf', 'what_.pdf'],
])('%j is kept as %j', (given, kept) => {
  expect(cleanFileName(given, 'photo')).toBe(kept)
})

test('whatever is given, the name has no folder, nothing unseen and a bounded length', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'binary', maxLength: 300 }), (given) => {
      const name = cleanFileName(given, 'photo')
      expect(name).not.toMatch(/[\\/\p{Cc}\p{Cf}]/u)
      expect(name).not.toMatch(/^\./)
      expect([...name].length).toBeGreaterThan(0)
      expect([...name].length).toBeLessThanOrEqual(120)
    }),
  )
})

test('the ending follows the content', () => {
  expect(['plan.PNG', 'plan', 'a.b.webp'].map((name) => nameWithEnding(name, 'jpg'))).toEqual(['plan.jpg', 'plan.jpg', 'a.b.jpg'])
})
