import type { Browser, Page } from 'playwright-core'
import { afterAll, bench, describe } from 'vitest'
import { launchBrowser } from '#tests/setup/browser.ts'
import { serveTestPage } from '#tests/setup/test-page.ts'

/**
 * Panning, 20 frames a round, at 1280 by 800. The first line is the floor: the same map with a cell layer that
 * draws nothing. What counts is how far the others are from it, and that they are near to each other.
 */
const FRAMES = 20
const OPTIONS = { time: 4000, iterations: 4, warmupTime: 500, warmupIterations: 1 }

const served = await serveTestPage('board-draw')
const browser: Browser = await launchBrowser()
afterAll(async () => {
  await browser.close()
  await served.close()
})

async function openBoard(columns: number, rows: number, empty: boolean): Promise<Page> {
  const page = await browser.newPage({ viewport: { width: 1280, height: 800 } })
  await page.goto(served.url)
  await page.evaluate(([columns, rows, empty]) => window.boardDraw.build(columns, rows, empty), [columns, rows, empty] as const)
  return page
}

describe(`${FRAMES} frames of panning`, () => {
  const cases = [
    { name: 'floor: no cells drawn', columns: 70, rows: 40, empty: true },
    { name: '2,800 cells', columns: 70, rows: 40, empty: false },
    { name: '35,000 cells', columns: 250, rows: 140, empty: false },
  ]
  for (const { name, columns, rows, empty } of cases) {
    let page: Page | undefined
    bench(
      name,
      async () => {
        page ??= await openBoard(columns, rows, empty)
        await page.evaluate((frames) => window.boardDraw.pan(frames), FRAMES)
      },
      OPTIONS,
    )
  }
})
