import { AxeBuilder } from '@axe-core/playwright'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { can } from '#shared/policies/policy.ts'
import { ROLES } from '#shared/policies/role.ts'
import type { Role } from '#shared/policies/role.ts'
import { launchBrowser } from '#tests/setup/browser.ts'
import { signIn } from './demo-people.ts'
import type { Person } from './demo-people.ts'

let browser: Browser

beforeAll(async () => {
  browser = await launchBrowser()
})
afterAll(() => browser.close())

const SIZES = [
  { width: 1440, height: 900 },
  { width: 1024, height: 768 },
  { width: 390, height: 844 },
] as const

async function first(person: Person, list: 'tests' | 'rework'): Promise<string> {
  return person.page.evaluate(
    async ([siteId, list]) => {
      const body = (await (await fetch(`/api/sites/${siteId}/${list}`)).json()) as Record<string, { id: string }[]>
      return (body.tests ?? body.orders ?? [])[0]?.id ?? ''
    },
    [person.siteId, list] as const,
  )
}

/** Every sheet the role's navigation leads to, and the sheets behind them; at the middle width those whose layout turns there. */
async function sheetsOf(role: Role, person: Person, width: number): Promise<string[]> {
  if (width === 1024) return role === 'technician' ? ['/ground?cell=N7', '/tests/new?cell=N7', '/lab'] : ['/ground?cell=N7', '/rework']
  const sheets = ['/ground', '/ground?cell=N7', '/rework', `/rework/${await first(person, 'rework')}`]
  if (!can(role, 'registers.see')) return sheets
  sheets.push('/frequency', '/tests', `/tests/${await first(person, 'tests')}`, '/lab')
  return can(role, 'test.record-qc') || can(role, 'test.record-qa') ? [...sheets, '/tests/new?cell=N7'] : sheets
}

describe.each(ROLES)('%s', (role) => {
  it.each(SIZES)('finds every sheet whole and reachable at $width px', async (size) => {
    const person = await signIn(browser, role, size)
    const { page } = person
    for (const sheet of await sheetsOf(role, person, size.width)) {
      await person.goTo(sheet)
      await page.getByRole('main').first().waitFor()
      await page.waitForLoadState('networkidle')
      const overflow = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
      expect(overflow, `${sheet} is wider than the window`).toBeLessThanOrEqual(0)
      const { violations } = await new AxeBuilder({ page }).analyze()
      const grave = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')
      expect(grave.map(({ id, nodes }) => `${sheet}: ${id} at ${nodes.map((node) => node.target.join(' ')).join(', ')}`)).toEqual([])
    }
    expect(person.complaints).toEqual([])
    expect(person.strangers).toEqual([])
    await person.context.close()
  })
})
