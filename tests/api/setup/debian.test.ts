import { expect, test } from 'vitest'
import { DATABASE_NEEDS, ensureChromium, ensurePrograms } from '#api/setup/debian.mjs'

test('nothing is installed when every program is there', async () => {
  const asked: string[] = []
  await ensurePrograms(DATABASE_NEEDS, (name) => {
    asked.push(name)
    return `/usr/bin/${name}`
  })
  expect(asked).toEqual(['mariadbd', 'mariadb-install-db', 'mariadb', 'mariadb-admin'])
})

test('a machine without apt is told exactly what is missing', async () => {
  const onlyClient = (name: string): string | null => (name === 'mariadb' ? '/usr/bin/mariadb' : null)
  await expect(ensurePrograms(DATABASE_NEEDS, onlyClient)).rejects.toThrow(
    /^Missing on this machine: mariadbd, mariadb-install-db, mariadb-admin\.\nThis is not a Debian machine: .*DATABASE_URL and CHROMIUM_PATH\.$/,
  )
})

test('a CHROMIUM_PATH that is no program is refused by name', async () => {
  await expect(ensureChromium({ CHROMIUM_PATH: '/nowhere/chromium' })).rejects.toThrow('CHROMIUM_PATH is /nowhere/chromium, which is not a program.')
})
