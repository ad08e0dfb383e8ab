import { textWidth } from '#web/components/drawing/place-labels.ts'

export type Spot = { readonly x: number; readonly y: number }
export type AlongLabel = Spot & { /** degrees, as SVG turns */ readonly angle: number; readonly width: number }

/** Share of the run that is tried for the middle of the label, best first. */
const SHARES = [0.22, 0.3, 0.15, 0.4, 0.5, 0.62, 0.75, 0.86] as const

/**
 * Where a label lies on its own line, turned with it, as far from everything else as the line allows.
 * @param run the visible part of the line in drawing units
 * @param obstacles what the label must not cover
 * @returns null where the line is too short for its label
 */
export function labelAlong(run: readonly Spot[], text: string, fontSize: number, obstacles: readonly Spot[]): AlongLabel | null {
  const first = run[0]
  const last = run.at(-1)
  if (first === undefined || last === undefined) return null
  const half = (textWidth(text, fontSize) + fontSize / 2) / 2
  if (Math.hypot(last.x - first.x, last.y - first.y) < 2.4 * half) return null
  const candidates = SHARES.flatMap((share) => {
    const at = run[Math.round(share * (run.length - 1))]
    if (at === undefined || Math.min(Math.hypot(at.x - first.x, at.y - first.y), Math.hypot(last.x - at.x, last.y - at.y)) < half) return []
    const clear = Math.min(Number.POSITIVE_INFINITY, ...obstacles.map((other) => Math.hypot(other.x - at.x, other.y - at.y) - half))
    return [{ at, share, clear }]
  })
  const best = candidates.find(({ clear }) => clear > fontSize) ?? candidates.reduce<(typeof candidates)[number] | undefined>((most, each) => (most !== undefined && most.clear >= each.clear ? most : each), undefined)
  if (best === undefined) return null
  const index = Math.round(best.share * (run.length - 1))
  const before = run[Math.max(0, index - 2)] ?? best.at
  const after = run[Math.min(run.length - 1, index + 2)] ?? best.at
  return { ...best.at, angle: (Math.atan2(after.y - before.y, after.x - before.x) * 180) / Math.PI, width: 2 * half }
}
