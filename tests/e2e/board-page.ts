import type { Browser, Page } from 'playwright-core'
import type { BoardPage } from './pages/board.tsx'

export interface OpenBoard {
  readonly page: Page
  /** warnings and errors of the page so far */
  readonly printed: string[]
}

/** Opens the board's own page and waits until it stands still. */
export async function openBoard(browser: Browser, url: string, reducedMotion: 'reduce' | 'no-preference'): Promise<OpenBoard> {
  const page = await browser.newPage({ viewport: { width: 1100, height: 820 }, reducedMotion })
  const printed: string[] = []
  page.on('console', (message) => {
    // reading the drawing back stalls the card, and the driver says so
    if (['error', 'warning'].includes(message.type()) && !message.text().includes('GPU stall due to ReadPixels')) printed.push(message.text())
  })
  page.on('pageerror', (error) => printed.push(error.message))
  await page.goto(url)
  await page.waitForFunction(() => (window as unknown as { boardPage?: BoardPage }).boardPage?.handle.current?.projectCellCenter(0) !== undefined)
  // a board that has not begun to draw stands still too
  for (let round = 0; round < 100 && !isDrawn(await takePicture(page)); round++) await page.waitForTimeout(200)
  await settle(page)
  return { page, printed }
}

/** Waits until the page has stopped changing: two pictures in a row are the same. */
export async function settle(page: Page): Promise<void> {
  let before = await page.screenshot()
  for (let round = 0; round < 60; round++) {
    await page.waitForTimeout(150)
    const after = await page.screenshot()
    if (after.equals(before)) return
    before = after
  }
  throw new Error('The board does not come to rest')
}

export interface Picture {
  readonly width: number
  readonly height: number
  readonly data: Uint8Array
}

/** What the page shows, as red, green, blue, alpha. */
export async function takePicture(page: Page): Promise<Picture> {
  const png = (await page.screenshot()).toString('base64')
  const { width, height, text } = await page.evaluate(async (base64) => {
    const image = new Image()
    image.src = `data:image/png;base64,${base64}`
    await image.decode()
    const canvas = new OffscreenCanvas(image.width, image.height)
    const pen = canvas.getContext('2d')!
    pen.drawImage(image, 0, 0)
    const bytes = pen.getImageData(0, 0, image.width, image.height).data
    let text = ''
    for (let at = 0; at < bytes.length; at += 30_000) text += String.fromCharCode(...bytes.subarray(at, at + 30_000))
    return { width: image.width, height: image.height, text: btoa(text) }
  }, png)
  return { width, height, data: new Uint8Array(Buffer.from(text, 'base64')) }
}

export interface Box {
  readonly left: number
  readonly top: number
  readonly right: number
  readonly bottom: number
}

/** True once cells are on the page: no other thing is large and not the colour of the sheet. */
function isDrawn(picture: Picture): boolean {
  const middle = pixelsIn(picture, { left: picture.width / 2 - 40, top: picture.height / 2 - 40, right: picture.width / 2 + 40, bottom: picture.height / 2 + 40 })
  return middle.filter((pixel) => pixel[0] < 200).length > middle.length / 2
}

/** Pixels of a box, edges rounded inwards. */
export function pixelsIn(picture: Picture, box: Box): [number, number, number][] {
  const pixels: [number, number, number][] = []
  for (let y = Math.ceil(box.top); y < Math.floor(box.bottom); y++) {
    for (let x = Math.ceil(box.left); x < Math.floor(box.right); x++) {
      const at = (y * picture.width + x) * 4
      pixels.push([picture.data[at]!, picture.data[at + 1]!, picture.data[at + 2]!])
    }
  }
  return pixels
}

/** Box around every pixel that differs between two pictures by more than the tolerance, undefined when none does. */
export function differenceBox(a: Picture, b: Picture, tolerance = 6): Box | undefined {
  let box: Box | undefined
  for (let at = 0; at < a.data.length; at++) {
    if (Math.abs(a.data[at]! - b.data[at]!) <= tolerance) continue
    const x = Math.floor(at / 4) % a.width
    const y = Math.floor(at / 4 / a.width)
    box = {
      left: Math.min(box?.left ?? x, x),
      top: Math.min(box?.top ?? y, y),
      right: Math.max(box?.right ?? x, x),
      bottom: Math.max(box?.bottom ?? y, y),
    }
  }
  return box
}
