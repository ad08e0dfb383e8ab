import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { launchBrowser } from '#tests/setup/browser.ts'
import { signIn } from './demo-people.ts'

let browser: Browser

beforeAll(async () => {
  browser = await launchBrowser()
})
afterAll(() => browser.close())

const pagesOf = (pdf: Buffer): number => pdf.toString('latin1').match(/\/Type\s*\/Page[^s]/g)?.length ?? 0

it('prints a test, what it rests on and lines to sign on, as one sheet of either size', async () => {
  const person = await signIn(browser, 'technician', { width: 1440, height: 900 })
  const { page, siteId } = person
  const failing = await page.evaluate(async (site) => {
    const { tests } = (await (await fetch(`/api/sites/${site}/tests?outcome=fail&superseded=true&limit=1`)).json()) as { tests: { id: string; number: string }[] }
    return tests[0]
  }, siteId)
  await person.goTo(`/tests/${failing?.id ?? ''}`)
  await page.getByText('Audit trail').waitFor()
  await page.waitForLoadState('networkidle')
  for (const format of ['A4', 'Letter']) expect(pagesOf(await page.pdf({ format })), format).toBe(1)
  await page.emulateMedia({ media: 'print' })
  const said = await page.locator('body').innerText()
  for (const words of [`${failing?.number ?? ''}`, 'Field density test', 'Wet density', 'Comes to', 'Judged by', 'Place and time', 'Chain', 'Tested by', 'Reviewed for quality control', 'For the owner', 'Printed Dec 1, 2026']) expect(said).toContain(words)
  for (const words of ['Void with reason', 'Record a retest', 'All results', 'Hardpan']) expect(said).not.toContain(words)
  await person.context.close()
})
