import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest'
import { locate } from '#shared/domain/grid.ts'
import { BOARD_GRID, BOARD_MARKS, boardCellAt } from '#tests/fixtures/board-site.ts'
import { launchBrowser } from '#tests/setup/browser.ts'
import { serveTestPage, type TestPage } from '#tests/setup/test-page.ts'
import { openBoard, settle } from './board-page.ts'

let served: TestPage
let browser: Browser
let page: Page
let printed: string[]

const place = (cell: number): Promise<{ x: number; y: number }> =>
  page.evaluate((cell) => window.boardPage.handle.current!.projectCellCenter(cell)!, cell)
const takeCalls = (): Promise<unknown[][]> => page.evaluate(() => window.boardPage.calls.splice(0))

async function drag(from: number, to: number): Promise<void> {
  const [start, end] = [await place(from), await place(to)]
  await page.mouse.move(start.x, start.y)
  await page.mouse.down()
  await page.mouse.move((start.x + end.x) / 2, (start.y + end.y) / 2, { steps: 3 })
  await page.mouse.move(end.x, end.y, { steps: 3 })
  await page.mouse.up()
}

beforeAll(async () => {
  served = await serveTestPage('board')
  browser = await launchBrowser()
  ;({ page, printed } = await openBoard(browser, served.url, 'reduce'))
})
beforeEach(async () => {
  await page.evaluate(() => window.boardPage.set({ mode: 'select' }))
  await page.locator('canvas').focus()
  await page.keyboard.press('0')
  await settle(page)
  await takeCalls()
})
afterAll(async () => {
  await browser?.close()
  await served?.close()
})

describe('by pointer', () => {
  test('a click picks the cell under it, at the first and the last cell of the sheet too', async () => {
    for (const [column, row] of [[1, 0], [23, 13], [5, 18], [11, 6]] as const) {
      const cell = boardCellAt(column, row)
      const { x, y } = await place(cell)
      await page.mouse.click(x + 8, y + 8)
      expect(await takeCalls()).toEqual([['cell', cell]])
    }
  })

  test('a click outside the boundary picks nothing', async () => {
    const { x, y } = await place(boardCellAt(0, 4))
    await page.mouse.click(x, y - 60)
    expect(await takeCalls()).toEqual([])
  })

  test('a click on a test opens it, a click on a stake opens that', async () => {
    const fail = BOARD_MARKS.find((mark) => mark.outcome === 'fail')!
    const address = locate(BOARD_GRID, fail)!
    expect(address).toEqual({ column: 7, row: 11 })
    const [center, next] = [await place(boardCellAt(7, 11)), await place(boardCellAt(8, 11))]
    const side = next.x - center.x
    await page.mouse.click(center.x + (7.3 - 7.5) * side, center.y + (11.2 - 11.5) * side)
    expect(await takeCalls()).toEqual([['test', fail.id]])
    await page.getByRole('button', { name: 'Stake N2' }).click()
    expect(await takeCalls()).toEqual([['stake', 'stake-2']])
  })

  test('a drag pans while selecting and the picked cell is still the one under the pointer', async () => {
    const cell = boardCellAt(9, 7)
    const before = await place(cell)
    await drag(cell, boardCellAt(12, 9))
    await settle(page)
    const after = await place(cell)
    expect(after.x - before.x).toBeGreaterThan(40)
    expect(await takeCalls()).toEqual([])
    await page.mouse.click(after.x + 9, after.y + 9)
    expect(await takeCalls()).toEqual([['cell', cell]])
  })

  test('a drag in area mode takes a rectangle of cells without moving the map', async () => {
    await page.evaluate(() => window.boardPage.set({ mode: 'area' }))
    const before = await place(0)
    await drag(boardCellAt(6, 10), boardCellAt(8, 12))
    const expected = [10, 11, 12].flatMap((row) => [6, 7, 8].map((column) => boardCellAt(column, row)))
    expect(await takeCalls()).toEqual([['area', expected, 'replace']])
    expect(await place(0)).toEqual(before)
  })

  test('shift adds a rectangle and toggles a cell, in every mode', async () => {
    await page.keyboard.down('Shift')
    await drag(boardCellAt(6, 5), boardCellAt(7, 5))
    const { x, y } = await place(boardCellAt(9, 5))
    await page.mouse.click(x, y)
    await page.keyboard.up('Shift')
    expect(await takeCalls()).toEqual([
      ['area', [boardCellAt(6, 5), boardCellAt(7, 5)], 'add'],
      ['area', [boardCellAt(9, 5)], 'toggle'],
    ])
  })

  test('a click in point mode gives the place in site coordinates, and its cell', async () => {
    await page.evaluate(() => window.boardPage.set({ mode: 'point' }))
    const cell = boardCellAt(4, 6)
    const { x, y } = await place(cell)
    await page.mouse.click(Math.round(x), Math.round(y))
    const [[name, point, picked]] = (await takeCalls()) as [[string, { easting: number; northing: number }, number]]
    expect([name, picked]).toEqual(['point', cell])
    expect(locate(BOARD_GRID, point)).toEqual({ column: 4, row: 6 })
  })
})

describe('by keyboard', () => {
  test('arrows ask for the next cell, shift and arrows pan, plus zooms, zero shows the whole site again', async () => {
    await page.keyboard.press('ArrowRight')
    await page.keyboard.press('ArrowUp')
    expect(await takeCalls()).toEqual([
      ['move', 1, 0],
      ['move', 0, -1],
    ])
    const home = await place(0)
    await page.keyboard.press('Shift+ArrowRight')
    await settle(page)
    expect((await place(0)).x).toBeCloseTo(home.x - 80, 0)
    await page.keyboard.press('+')
    await settle(page)
    await page.keyboard.press('0')
    await settle(page)
    expect((await place(0)).x).toBeCloseTo(home.x, 0)
    expect(await takeCalls()).toEqual([])
  })

  test('stakes are reached by tab and opened by enter', async () => {
    await page.getByRole('button', { name: 'Stake N1' }).focus()
    await page.keyboard.press('Enter')
    expect(await takeCalls()).toEqual([['stake', 'stake-1']])
  })

  test('a cell out of view is brought into view', async () => {
    for (let press = 0; press < 4; press++) await page.keyboard.press('+')
    await settle(page)
    const cell = boardCellAt(23, 13)
    expect((await place(cell)).x).toBeGreaterThan(1100)
    await page.evaluate((cell) => window.boardPage.handle.current!.panToCell(cell), cell)
    await settle(page)
    const { x, y } = await place(cell)
    expect(x).toBeGreaterThan(30)
    expect(x).toBeLessThan(1100)
    expect(y).toBeLessThan(820)
  })
})

test('the letters and numbers of the margins stand over their cells after panning and zooming', async () => {
  await page.keyboard.press('+')
  await page.keyboard.press('Shift+ArrowDown')
  await settle(page)
  const cell = boardCellAt(11, 9)
  await page.evaluate((cell) => window.boardPage.set({ selectedCell: cell }), cell)
  await settle(page)
  const chosen = await page.$$eval('.board-margin-chosen', (texts) => texts.map((text) => ({ words: text.textContent, x: Number(text.getAttribute('x')), y: Number(text.getAttribute('y')) })))
  const { x, y } = await place(cell)
  expect(chosen.map(({ words }) => words)).toEqual(['L', '10'])
  // the web map shears a turned grid by a thousandth between the margin and the cell
  expect(Math.abs(chosen[0]!.x - x)).toBeLessThan(1)
  expect(Math.abs(chosen[1]!.y - 4 - y)).toBeLessThan(1)
})

test('nothing is printed on the way and nothing is asked of another origin', () => {
  expect(printed).toEqual([])
})
