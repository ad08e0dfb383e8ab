/** A rectangle in drawing units, y downward. */
export type Box = { readonly x: number; readonly y: number; readonly width: number; readonly height: number }

export type LabelWish = {
  readonly id: string
  readonly text: string
  readonly fontSize: number
  /** Places for the left end of the base line, best first. */
  readonly places: readonly { readonly x: number; readonly y: number }[]
}

export type PlacedLabel = { readonly id: string; readonly text: string; readonly fontSize: number; readonly x: number; readonly y: number }

/** Mean advance of the text face at weight 600, share of its size; a little generous, so that boxes err apart. */
const ADVANCE = 0.55

/** Width of a line of text in drawing units, near enough to keep labels apart. */
export function textWidth(text: string, fontSize: number): number {
  return text.length * fontSize * ADVANCE
}

function overlaps(a: Box, b: Box): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height
}

function overlapArea(a: Box, b: Box): number {
  const across = Math.min(a.x + a.width, b.x + b.width) - Math.max(a.x, b.x)
  const down = Math.min(a.y + a.height, b.y + b.height) - Math.max(a.y, b.y)
  return across > 0 && down > 0 ? across * down : 0
}

/**
 * Gives each label the first of its places that stays inside the frame and clear of obstacles and earlier labels;
 * where all collide, the place that collides least. Labels are moved into the frame rather than clipped.
 */
export function placeLabels(wishes: readonly LabelWish[], obstacles: readonly Box[], frame: Box): readonly PlacedLabel[] {
  const taken: Box[] = [...obstacles]
  return wishes.map(({ id, text, fontSize, places }) => {
    const width = textWidth(text, fontSize)
    const candidates = places.map(({ x, y }) => {
      const left = Math.max(frame.x, Math.min(x, frame.x + frame.width - width))
      const base = Math.max(frame.y + fontSize, Math.min(y, frame.y + frame.height - fontSize * 0.3))
      const box: Box = { x: left, y: base - fontSize, width, height: fontSize * 1.3 }
      return { left, base, box, cost: taken.reduce((sum, other) => sum + overlapArea(box, other), 0) }
    })
    const free = candidates.find(({ box }) => !taken.some((other) => overlaps(box, other)))
    const best = free ?? candidates.reduce((least, each) => (each.cost < least.cost ? each : least))
    taken.push(best.box)
    return { id, text, fontSize, x: best.left, y: best.base }
  })
}
