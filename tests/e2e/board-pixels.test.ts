import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { GROUND_FLAGS, GROUND_STATES, groundStateCode, type GroundState } from '#shared/domain/ground-state.ts'
import type { Rgb } from '#shared/look/colour.ts'
import { STIPPLE_DOTS, stateLook, type Hatch } from '#shared/look/ground-look.ts'
import { SHEET_COLOURS } from '#shared/look/theme.ts'
import { boardCellAt } from '#tests/fixtures/board-site.ts'
import { launchBrowser } from '#tests/setup/browser.ts'
import { serveTestPage, type TestPage } from '#tests/setup/test-page.ts'
import { differenceBox, openBoard, pixelsIn, settle, takePicture, type Box, type Picture } from './board-page.ts'

let served: TestPage
let browser: Browser
let page: Page
let printed: string[]

interface CellPaint {
  cell: number
  state?: GroundState
  flags?: number
  lift?: number
  top?: number
}

/** Lays an even sheet of cells that meet spec, all of one height, with these cells otherwise. */
async function paint(paints: readonly CellPaint[]): Promise<void> {
  const coded = paints.map((one) => ({ ...one, code: groundStateCode(one.state ?? 'meets-spec') }))
  await page.evaluate(
    ({ coded, base }) => {
      const { sheet, set } = window.boardPage
      sheet.state.fill(base)
      sheet.flags.fill(0)
      sheet.lift.fill(3)
      sheet.top.fill(10_000)
      for (const { cell, code, flags, lift, top } of coded) {
        sheet.state[cell] = code
        sheet.flags[cell] = flags ?? 0
        sheet.lift[cell] = lift ?? 3
        sheet.top[cell] = top ?? 10_000
      }
      set({ sheet: { ...sheet } })
    },
    { coded, base: groundStateCode('meets-spec') },
  )
  await settle(page)
}

/** The square of a cell on the page, made smaller by `inset` pixels all around. */
async function boxOf(cell: number, inset: number): Promise<Box> {
  const { x, y, side } = await page.evaluate(
    ([cell, next]) => {
      const at = (index: number) => window.boardPage.handle.current!.projectCellCenter(index)!
      return { ...at(cell!), side: at(next!).x - at(cell!).x }
    },
    [cell, cell + 1],
  )
  const half = side / 2 - inset
  return { left: x - half, top: y - half, right: x + half, bottom: y + half }
}

/** Mean share of `mark` in a picture of `fill` marked with it, and the farthest any pixel is from such a mixture. */
function mixture(pixels: readonly Rgb[], fill: Rgb, mark: Rgb): { share: number; stray: number } {
  const axis = fill.map((channel, index) => mark[index]! - channel)
  const length = axis.reduce((sum, part) => sum + part * part, 0) || 1
  let share = 0
  let stray = 0
  for (const pixel of pixels) {
    const along = pixel.reduce((sum, channel, index) => sum + (channel - fill[index]!) * axis[index]!, 0) / length
    share += along / pixels.length
    stray = Math.max(stray, ...pixel.map((channel, index) => Math.abs(channel - fill[index]! - along * axis[index]!)))
  }
  return { share, stray }
}

/** Share of the area a hatch covers, from its definition. */
function coverOf({ kind, spacing, stroke }: Hatch): number {
  const slanted = (stroke * Math.SQRT2) / spacing
  switch (kind) {
    case 'none':
      return 0
    case 'stipple':
      return STIPPLE_DOTS.reduce((sum, [, , radius]) => sum + Math.PI * radius * radius, 0)
    case 'diagonals':
    case 'sparse-diagonals':
      return slanted
    case 'cross-hatch':
      return 1 - (1 - slanted) ** 2
    default:
      return stroke / spacing
  }
}

const inkShare = (picture: Picture, box: Box): number => {
  const [red, green, blue] = SHEET_COLOURS.light.ink.rgb
  const pixels = pixelsIn(picture, box)
  return pixels.filter(([r, g, b]) => Math.abs(r - red) + Math.abs(g - green) + Math.abs(b - blue) < 90).length / pixels.length
}

/** The bare states stand among their own kind: against placed ground they would have step edges. */
const BARE_AT: Readonly<Partial<Record<GroundState, readonly [number, number]>>> = { none: [8, 15], 'not-placed': [13, 15] }
const shownStates = GROUND_STATES.map((state, index) => ({ state, cell: boardCellAt(...(BARE_AT[state] ?? [2 + index * 2, 6])) }))
const statePaints: CellPaint[] = shownStates.flatMap(({ state, cell }) => {
  const middle = BARE_AT[state]
  if (middle === undefined) return [{ state, cell }]
  return [-1, 0, 1].flatMap((right) => [-1, 0, 1].map((down) => ({ state, cell: boardCellAt(middle[0] + right, middle[1] + down), lift: 0 })))
})

beforeAll(async () => {
  served = await serveTestPage('board')
  browser = await launchBrowser()
  ;({ page, printed } = await openBoard(browser, `${served.url}?plain`, 'reduce'))
})
afterAll(async () => {
  await browser?.close()
  await served?.close()
})

describe('the cells as the browser paints them', () => {
  let picture: Picture
  beforeAll(async () => {
    await paint(statePaints)
    picture = await takePicture(page)
  })

  test.each(shownStates)('$state is filled and hatched as the shared look says, and with nothing else', async ({ state, cell }) => {
    const look = stateLook(state)
    const fill = state === 'none' || state === 'not-placed' ? SHEET_COLOURS.light.sheet.rgb : look.fill.rgb
    const { share, stray } = mixture(pixelsIn(picture, await boxOf(cell, 4)), fill, look.hatch.mark.rgb)
    expect(stray).toBeLessThan(4)
    expect(share).toBeGreaterThan(coverOf(look.hatch) - 0.06)
    expect(share).toBeLessThan(coverOf(look.hatch) + 0.06)
  })

  test('a cell that is not placed has a dotted edge, one with no fill has none', async () => {
    const edgeInk = async (state: GroundState): Promise<number> => {
      const cell = shownStates.find((shown) => shown.state === state)!.cell
      const { left, top, right } = await boxOf(cell, 0)
      const strip = pixelsIn(picture, { left: left + 3, right: right - 3, top: Math.round(top) - 2, bottom: Math.round(top) + 2 })
      return mixture(strip, SHEET_COLOURS.light.sheet.rgb, stateLook('not-placed').cellLine.colour.rgb).share
    }
    const { width, dash } = stateLook('not-placed').cellLine
    const expected = ((width / 4) * dash[0]!) / (dash[0]! + dash[1]!)
    expect(await edgeInk('not-placed')).toBeGreaterThan(expected * 0.6)
    expect(await edgeInk('not-placed')).toBeLessThan(expected * 1.4)
    expect(await edgeInk('none')).toBe(0)
  })
})

describe('overlays', () => {
  const near = boardCellAt(8, 6)
  const covered = boardCellAt(10, 6)
  const hold = boardCellAt(12, 6)
  const partial = boardCellAt(14, 6)
  const waiting = boardCellAt(16, 6)
  const doubt = boardCellAt(18, 6)
  let picture: Picture
  beforeAll(async () => {
    await paint([
      { cell: near, flags: GROUND_FLAGS.near },
      { cell: covered, flags: GROUND_FLAGS.covered },
      { cell: hold, flags: GROUND_FLAGS.hold },
      { cell: partial, flags: GROUND_FLAGS.partial },
      { cell: waiting, flags: GROUND_FLAGS.awaitingAcceptance },
      { cell: doubt, flags: GROUND_FLAGS.doubt },
    ])
    picture = await takePicture(page)
  })

  test('near a limit lays horizontal lines over a fifth of the state', async () => {
    const { fill, nearHatch } = stateLook('meets-spec')
    const { share, stray } = mixture(pixelsIn(picture, await boxOf(near, 4)), fill.rgb, nearHatch.mark.rgb)
    expect(stray).toBeLessThan(4)
    expect(share).toBeCloseTo(nearHatch.stroke / nearHatch.spacing, 1)
  })

  test('covered too early has a heavy ink edge and a wedge at the top left only', async () => {
    const box = await boxOf(covered, 0)
    expect(inkShare(picture, { ...box, bottom: box.top + 3 })).toBeGreaterThan(0.6)
    expect(inkShare(picture, { left: box.left + 4, top: box.top + 4, right: box.left + 9, bottom: box.top + 9 })).toBeGreaterThan(0.5)
    expect(inkShare(picture, { left: box.right - 10, top: box.bottom - 10, right: box.right - 5, bottom: box.bottom - 5 })).toBe(0)
  })

  test('a hold splits the top right corner into ink and white', async () => {
    const box = await boxOf(hold, 0)
    const corner = { left: box.right - 14, top: box.top, right: box.right, bottom: box.top + 14 }
    expect(inkShare(picture, corner)).toBeGreaterThan(0.08)
    expect(pixelsIn(picture, corner).filter((pixel) => pixel.every((channel) => channel > 245)).length).toBeGreaterThan(20)
  })

  test('a partly placed cell shows the sheet in its last quarter', async () => {
    const box = await boxOf(partial, 0)
    const middle = { x: (box.left + box.right) / 2, y: (box.top + box.bottom) / 2 }
    const quarter = pixelsIn(picture, { left: middle.x + 4, top: middle.y + 4, right: box.right - 4, bottom: box.bottom - 4 })
    expect(mixture(quarter, SHEET_COLOURS.light.sheet.rgb, [0, 0, 0]).share).toBeLessThan(0.01)
    const rest = pixelsIn(picture, { left: box.left + 4, top: box.top + 4, right: middle.x - 4, bottom: middle.y - 4 })
    expect(mixture(rest, stateLook('meets-spec').fill.rgb, [0, 0, 0]).share).toBeLessThan(0.01)
  })

  test('waiting for acceptance is a small square at the lower left, doubt a broken edge', async () => {
    const box = await boxOf(waiting, 0)
    expect(inkShare(picture, { left: box.left + 3, top: box.bottom - 11, right: box.left + 11, bottom: box.bottom - 3 })).toBeGreaterThan(0.2)
    const edge = await boxOf(doubt, 1)
    const broken = inkShare(picture, { ...edge, bottom: edge.top + 3 })
    expect(broken).toBeGreaterThan(0.1)
    expect(broken).toBeLessThan(0.7)
  })
})

test('a step edge is an ink line with hachures on the low side only, and follows tops, not lift numbers', async () => {
  const high = boardCellAt(9, 8)
  const sameTop = boardCellAt(15, 8)
  await paint([
    { cell: high, lift: 3, top: 12_000 },
    { cell: sameTop, lift: 7, top: 10_000 },
  ])
  const picture = await takePicture(page)
  const box = await boxOf(high, 0)
  const along = { top: box.top + 3, bottom: box.bottom - 3 }
  expect(inkShare(picture, { ...along, left: box.right - 1, right: box.right + 1 })).toBeGreaterThan(0.4)
  const hachures = (strip: Box): number => mixture(pixelsIn(picture, strip), stateLook('meets-spec').fill.rgb, SHEET_COLOURS.light.ink.rgb).share
  expect(hachures({ ...along, left: box.right + 1, right: box.right + 5 })).toBeGreaterThan(0.06)
  expect(Math.abs(hachures({ ...along, left: box.right - 5, right: box.right - 1 }))).toBeLessThan(0.02)
  const level = await boxOf(sameTop, 0)
  expect(inkShare(picture, { ...along, left: level.right - 1, right: level.right + 1 })).toBe(0)
})

test('a patch changes the pixels of its own cells and no others', async () => {
  await paint([])
  const before = await takePicture(page)
  const cell = boardCellAt(13, 9)
  await page.evaluate(
    ([cell, state]) => {
      window.boardPage.sheet.state[cell!] = state!
      window.boardPage.handle.current!.patchCells([cell!], null)
    },
    [cell, groundStateCode('rework')],
  )
  await settle(page)
  const after = await takePicture(page)
  const changed = differenceBox(before, after)!
  const box = await boxOf(cell, 0)
  for (const side of ['left', 'top', 'right', 'bottom'] as const) expect(Math.abs(changed[side] - box[side])).toBeLessThan(1.6)
  const { share } = mixture(pixelsIn(after, await boxOf(cell, 4)), stateLook('rework').fill.rgb, stateLook('rework').hatch.mark.rgb)
  expect(share).toBeCloseTo(coverOf(stateLook('rework').hatch), 1)
})

test('the ink spreads from the test outward and comes to rest as the sheet is', async () => {
  await paint([])
  await page.emulateMedia({ reducedMotion: 'no-preference' })
  const cells = Array.from({ length: 14 }, (_, index) => boardCellAt(5 + index, 10))
  const clock = await page.evaluate(
    ({ cells, state }) => {
      const start = performance.now()
      let now = start
      performance.now = () => now
      Object.assign(window, { setClock: (ms: number) => (now = start + ms) })
      const { sheet, handle } = window.boardPage
      for (const cell of cells) sheet.state[cell] = state
      handle.current!.patchCells(cells, { easting: 1_281_400, northing: 231_200 })
      return start
    },
    { cells, state: groundStateCode('released') },
  )
  expect(clock).toBeGreaterThan(0)
  const shareAt = async (cell: number): Promise<number> => {
    const pixels = pixelsIn(await takePicture(page), await boxOf(cell, 4))
    return mixture(pixels, stateLook('meets-spec').fill.rgb, stateLook('released').fill.rgb).share
  }
  const setClock = async (ms: number): Promise<void> => {
    await page.evaluate((ms) => (window as unknown as { setClock: (ms: number) => void }).setClock(ms), ms)
    await settle(page)
  }
  await setClock(200)
  expect(await shareAt(cells[0]!)).toBeGreaterThan(0.95)
  expect(await shareAt(cells[13]!)).toBeLessThan(0.05)
  await setClock(601)
  expect(await shareAt(cells[13]!)).toBeGreaterThan(0.95)
  await page.emulateMedia({ reducedMotion: 'reduce' })
})

test('the board comes back as it was after the graphics context is lost', async () => {
  await paint(statePaints)
  const before = await takePicture(page)
  await page.evaluate(async () => {
    const context = document.querySelector('canvas')!.getContext('webgl2')!
    const lose = context.getExtension('WEBGL_lose_context')!
    lose.loseContext()
    await new Promise((resolve) => setTimeout(resolve, 200))
    lose.restoreContext()
  })
  await expect.poll(async () => differenceBox(before, await takePicture(page)), { timeout: 30_000 }).toBeUndefined()
})

test('nothing is refused by the strict content policy and nothing goes wrong on the way', () => {
  const expected = /cannot be restored after WebGL context loss|CONTEXT_LOST_WEBGL|context lost|WebGL context was lost/i
  expect(printed.filter((line) => !expected.test(line))).toEqual([])
})
