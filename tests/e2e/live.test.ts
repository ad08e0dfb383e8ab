import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, expect, it, vi } from 'vitest'
import { formatCellRange } from '#shared/domain/cell-range.ts'
import type { SiteCells } from '#shared/schemas/site.ts'
import { launchBrowser } from '#tests/setup/browser.ts'
import { signIn } from './demo-people.ts'
import type { Person } from './demo-people.ts'

let browser: Browser

beforeAll(async () => {
  browser = await launchBrowser()
})
afterAll(() => browser.close())

const PATIENCE = { timeout: 20_000, interval: 200 }

/** Waits for words that can be seen: sheets of both widths may hold them. */
const seen = (page: Page, words: string | RegExp) => page.getByText(words).filter({ visible: true }).first().waitFor()

/** Waits until the list says that a cell is in rework. */
async function seenInList(page: Page, label: string): Promise<void> {
  await page.getByRole('button', { name: 'List' }).click()
  await page.getByLabel('Find').fill(label)
  await page.getByRole('row').filter({ hasText: new RegExp(`^${label}`) }).filter({ hasText: 'Rework' }).first().waitFor()
}

/** A mark on the window that a reload would wipe. */
const mark = (page: Page) => page.evaluate(() => Object.assign(window, { untouched: true }))
const isUntouched = (page: Page) => page.evaluate(() => 'untouched' in window)

async function readyFigure({ page }: Person): Promise<number> {
  const text = (await page.locator('section', { has: page.getByRole('heading', { name: 'May receive the next lift' }) }).first().textContent()) ?? ''
  return Number(/([\d,]+)\s*cy/.exec(text)?.[1]?.replaceAll(',', '') ?? Number.NaN)
}

async function labelsOf({ page, siteId }: Person, cells: readonly number[]): Promise<string> {
  const plan: SiteCells = await page.evaluate(async (id) => (await fetch(`/api/sites/${id}/cells`)).json(), siteId)
  return formatCellRange(cells.map((cell) => ({ column: plan.column[cell] ?? 0, row: plan.row[cell] ?? 0 })))
}

it('carries a failing test from the technician to every open board, and to one that was away', async () => {
  const [technician, superintendent, lead, owner] = [
    await signIn(browser, 'technician'),
    await signIn(browser, 'superintendent'),
    await signIn(browser, 'qc-lead'),
    await signIn(browser, 'owner-rep'),
  ]
  for (const person of [superintendent, owner]) await person.goTo('/ground')
  await lead.goTo('/frequency')
  await superintendent.page.getByRole('heading', { name: 'May receive the next lift' }).waitFor()
  await seen(lead.page, 'Pad L10, Dec 1')
  await owner.page.getByRole('heading', { name: 'Filled to grade' }).waitFor()
  for (const { page } of [superintendent, lead, owner]) await mark(page)
  const before = await superintendent.board()
  await vi.waitFor(async () => expect(await readyFigure(superintendent)).toBe(Math.round(before.totals.readyCm3 / 764_554.857984)), PATIENCE)
  await owner.context.setOffline(true)
  await seen(owner.page, /No signal since/)

  // a failure in ground that is released and ready: Cell G12 of the pad, lift 9
  await technician.goTo('/tests/new?cell=G12&lift=9')
  const form = technician.page
  await form.getByText('Judgement', { exact: true }).click()
  await form.getByText('Density and moisture', { exact: true }).click()
  await form.getByLabel('Dry density', { exact: true }).fill('113.2')
  await form.getByText('Stated', { exact: true }).click()
  await form.getByLabel('Moisture of dry mass').fill('8.4')
  await form.getByLabel('Depth below surface').fill('6')
  await seen(form, /Too dry/)
  await seen(form, /go(es)? to rework when this is saved/)
  await form.getByRole('button', { name: 'Save result' }).filter({ visible: true }).first().click()
  await seen(form, /T-\d{4} saved/)

  const after = await superintendent.board()
  expect(after.totals.cellsInRework).toBeGreaterThan(before.totals.cellsInRework)
  expect(after.totals.readyCm3).toBeLessThan(before.totals.readyCm3)
  const order = after.notYet.find((group) => group.reason === 'rework' && !before.notYet.some((old) => old.orderId === group.orderId))
  expect(order?.orderNumber).toMatch(/^R-\d{3}$/)

  // the superintendent's Ground: title block, ready figure, the order among what is not ready, the cells in the list
  const { page } = superintendent
  await vi.waitFor(async () => expect(await readyFigure(superintendent)).toBe(Math.round(after.totals.readyCm3 / 764_554.857984)), PATIENCE)
  await seen(page, new RegExp(`Rework ${order?.orderNumber}`))
  const labels = await labelsOf(superintendent, order?.cells ?? [])
  const [first = ''] = labels.split(/[:,]/)
  await seenInList(page, first)
  expect(await isUntouched(page)).toBe(true)

  // the lot, in the lead's register
  await seen(lead.page, new RegExp(`Rework ${order?.orderNumber}`))
  expect(await isUntouched(lead.page)).toBe(true)

  // the one that was away
  await owner.context.setOffline(false)
  await vi.waitFor(async () => expect(await owner.page.getByText(/No signal since/).count()).toBe(0), PATIENCE)
  await seenInList(owner.page, first)
  expect(await isUntouched(owner.page)).toBe(true)
  for (const person of [technician, superintendent, lead, owner]) {
    expect(person.complaints).toEqual([])
    expect(person.strangers).toEqual([])
    await person.context.close()
  }
})
