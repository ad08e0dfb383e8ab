import { MARK_INK, WHITE } from '#shared/look/theme.ts'
import { markImageName } from './board-style.ts'
import type { MarkOutcome } from './board-types.ts'

const SIDE = 26
const OUTCOMES: readonly MarkOutcome[] = ['pass', 'near', 'fail', 'suspect', 'pending']

type Pen = OffscreenCanvasRenderingContext2D

function ring(pen: Pen, radius: number): void {
  pen.beginPath()
  pen.arc(0, 0, radius, 0, 2 * Math.PI)
}

function strokePath(pen: Pen, path: string, width: number, fill: boolean): void {
  const shape = new Path2D(path)
  if (fill) pen.fill(shape)
  pen.lineWidth = width
  pen.stroke(shape)
}

/** The second ring of a verification test, clear of the mark inside it. */
const VERIFICATION_RADIUS: Readonly<Record<MarkOutcome, number>> = { pass: 8.5, near: 8.5, fail: 10, suspect: 10.5, pending: 8.5 }

function verificationRing(pen: Pen, radius: number): void {
  ring(pen, radius)
  pen.fill()
  pen.lineWidth = 1.2
  pen.stroke()
}

const DRAW: Readonly<Record<MarkOutcome, (pen: Pen, ink: string) => void>> = {
  pass(pen, ink) {
    ring(pen, 5)
    pen.fill()
    pen.lineWidth = 1.4
    pen.stroke()
    ring(pen, 1.9)
    pen.fillStyle = ink
    pen.fill()
  },
  near(pen) {
    ring(pen, 5)
    pen.fill()
    pen.lineWidth = 1.4
    pen.stroke()
    strokePath(pen, 'M-5 0h10', 1.4, false)
  },
  fail(pen) {
    strokePath(pen, 'M-5.5 -5.5h11v11h-11z', 1.6, true)
    strokePath(pen, 'M-3 -3l6 6m0 -6l-6 6', 1.6, false)
  },
  suspect(pen, ink) {
    strokePath(pen, 'M0 -7.5l7.5 13h-15z', 1.6, true)
    // the question mark is drawn, so that it does not wait for a font
    strokePath(pen, 'M-1.9 -0.9a1.9 1.9 0 1 1 2.9 1.6q-1 .55 -1 1.5', 1.3, false)
    pen.translate(0, 3.7)
    ring(pen, 0.85)
    pen.fillStyle = ink
    pen.fill()
  },
  pending(pen) {
    ring(pen, 5)
    pen.fill()
    pen.lineWidth = 1.4
    pen.setLineDash([2.4, 1.53])
    pen.stroke()
  },
}

export interface MarkImage {
  readonly name: string
  readonly image: ImageData
  readonly pixelRatio: number
}

/** The test marks as images for the map, drawn at the screen's own density. */
export function drawMarkImages(pixelRatio: number): MarkImage[] {
  const ratio = Math.max(2, Math.ceil(pixelRatio))
  const ink = MARK_INK.css
  return OUTCOMES.flatMap((outcome) =>
    [false, true].map((verification) => {
      const canvas = new OffscreenCanvas(SIDE * ratio, SIDE * ratio)
      const pen = canvas.getContext('2d')
      if (pen === null) throw new Error('This browser cannot draw the test marks')
      pen.scale(ratio, ratio)
      pen.translate(SIDE / 2, SIDE / 2)
      pen.fillStyle = WHITE.css
      pen.strokeStyle = ink
      pen.lineCap = 'butt'
      if (verification) verificationRing(pen, VERIFICATION_RADIUS[outcome])
      DRAW[outcome](pen, ink)
      return {
        name: markImageName({ outcome, verification }),
        image: pen.getImageData(0, 0, SIDE * ratio, SIDE * ratio),
        pixelRatio: ratio,
      }
    }),
  )
}
