import type { Browser, BrowserContext, Page } from 'playwright-core'
import { inject } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import type { Board } from '#shared/schemas/ground.ts'
import { DEMO_PASSWORD, DEMO_PEOPLE } from '#seed/demo/demo-people.ts'

export interface Person {
  readonly context: BrowserContext
  readonly page: Page
  readonly siteId: string
  /** what the browser printed as an error or warning, expected answers aside */
  readonly complaints: string[]
  /** addresses outside the server that were asked for */
  readonly strangers: string[]
  goTo(rest: string): Promise<void>
  board(): Promise<Board>
}

interface Settings {
  readonly width?: number
  readonly height?: number
}

/** The driver of the software renderer says that reading pixels is slow: not the page's doing. */
const NOT_OURS = /GL Driver Message|status of 4\d\d|status of 50[234]|ERR_INTERNET_DISCONNECTED|WebSocket connection to/

/** Somebody of the demo, signed in through the sign-in page, on the site that has work. */
export async function signIn(browser: Browser, role: Role, { width = 1440, height = 900 }: Settings = {}): Promise<Person> {
  const url = inject('demoUrl')
  const context = await browser.newContext({ viewport: { width, height }, timezoneId: 'America/Los_Angeles' })
  const page = await context.newPage()
  const complaints: string[] = []
  const strangers: string[] = []
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type()) && !NOT_OURS.test(message.text())) complaints.push(message.text())
  })
  page.on('pageerror', (error) => complaints.push(error.message))
  page.on('request', (request) => {
    const asked = request.url()
    if (!asked.startsWith(url) && !/^(data|blob):/.test(asked)) strangers.push(asked)
  })
  await page.goto(`${url}/sign-in`)
  await page.getByLabel(/e-?mail/i).fill(DEMO_PEOPLE.find((person) => person.role === role)?.email ?? '')
  await page.getByLabel(/password/i).fill(DEMO_PASSWORD)
  await page.getByRole('button', { name: /sign in/i }).click()
  await page.getByText('Alder Flats yard').first().waitFor()
  const siteId = await page.evaluate(async () => {
    const { sites } = (await (await fetch('/api/sites')).json()) as { sites: { id: string; name: string }[] }
    return sites.find((site) => site.name === 'Alder Flats yard')?.id ?? ''
  })
  return {
    context,
    page,
    siteId,
    complaints,
    strangers,
    goTo: async (rest) => {
      await page.goto(`${url}/sites/${siteId}${rest}`)
    },
    board: () => page.evaluate(async (id) => (await fetch(`/api/sites/${id}/board`)).json(), siteId),
  }
}
