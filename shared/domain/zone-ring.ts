import type { SitePoint, SiteRing } from './site-geometry.ts'

export type RingCheck = { readonly ok: true } | { readonly ok: false; readonly reason: string }

/** How far a zone may stand over the boundary and still count as drawn along it, in the site's unit. */
const ALONG_BOUNDARY = 0.01

const OK: RingCheck = { ok: true }
const refuse = (reason: string): RingCheck => ({ ok: false, reason })

type Side = readonly [SitePoint, SitePoint]

function sidesOf(ring: SiteRing): Side[] {
  return ring.map((point, i) => [point, ring[(i + 1) % ring.length] ?? point])
}

/** Twice the signed area of a triangle: which side of a→b the point c is on. */
function turn(a: SitePoint, b: SitePoint, c: SitePoint): number {
  return (b.easting - a.easting) * (c.northing - a.northing) - (c.easting - a.easting) * (b.northing - a.northing)
}

function within(a: SitePoint, b: SitePoint, c: SitePoint): boolean {
  return between(a.easting, b.easting, c.easting) && between(a.northing, b.northing, c.northing)
}

// functions of their own: one made anew at each call costs more here than what it computes
function between(p: number, q: number, x: number): boolean {
  return Math.min(p, q) <= x && x <= Math.max(p, q)
}

function spansNear(p: number, q: number, r: number, s: number, distance: number): boolean {
  return Math.max(p, q) + distance >= Math.min(r, s) && Math.max(r, s) + distance >= Math.min(p, q)
}

/** Whether the boxes round two sides come within a distance: a cheap first question, outlines have thousands of sides. */
function boxesNear([a, b]: Side, [c, d]: Side, distance: number): boolean {
  return (
    spansNear(a.easting, b.easting, c.easting, d.easting, distance) && spansNear(a.northing, b.northing, c.northing, d.northing, distance)
  )
}

/** Whether two sides meet anywhere, touching included. */
function sidesMeet([a, b]: Side, [c, d]: Side): boolean {
  if (!boxesNear([a, b], [c, d], 0)) return false
  const [atC, atD, atA, atB] = [turn(a, b, c), turn(a, b, d), turn(c, d, a), turn(c, d, b)].map(Math.sign)
  if (atC !== atD && atA !== atB) return true
  return (
    (atC === 0 && within(a, b, c)) || (atD === 0 && within(a, b, d)) || (atA === 0 && within(c, d, a)) || (atB === 0 && within(c, d, b))
  )
}

function headsBack(a: SitePoint, b: SitePoint, c: SitePoint): boolean {
  return (b.easting - a.easting) * (c.easting - b.easting) + (b.northing - a.northing) * (c.northing - b.northing) < 0
}

function checkSides(ring: SiteRing): RingCheck {
  const sides = sidesOf(ring)
  const name = (i: number) => `${i + 1}–${((i + 1) % ring.length) + 1}`
  for (const [i, [a, b]] of sides.entries()) {
    if (a.easting === b.easting && a.northing === b.northing) {
      return refuse(`Points ${name(i).replace('–', ' and ')} are at the same place.`)
    }
    const next = sides[(i + 1) % sides.length]?.[1]
    if (next && turn(a, b, next) === 0 && headsBack(a, b, next)) {
      return refuse(`The outline doubles back on itself at point ${((i + 1) % ring.length) + 1}.`)
    }
  }
  for (const [i, side] of sides.entries()) {
    for (let j = i + 2; j < sides.length; j++) {
      const other = sides[j]
      const adjacent = i === 0 && j === sides.length - 1
      if (other && !adjacent && sidesMeet(side, other)) {
        return refuse(`The outline crosses or touches itself: sides ${name(i)} and ${name(j)} meet.`)
      }
    }
  }
  return OK
}

function sidesHold(sides: readonly Side[], point: SitePoint): boolean {
  let inside = false
  for (const [a, b] of sides) {
    if (a.northing > point.northing === b.northing > point.northing) continue
    const share = (point.northing - a.northing) / (b.northing - a.northing)
    if (point.easting < a.easting + share * (b.easting - a.easting)) inside = !inside
  }
  return inside
}

function distanceToSide([a, b]: Side, point: SitePoint): number {
  const [de, dn] = [b.easting - a.easting, b.northing - a.northing]
  const along = ((point.easting - a.easting) * de + (point.northing - a.northing) * dn) / (de * de + dn * dn)
  const share = Math.min(1, Math.max(0, along))
  return Math.hypot(a.easting + share * de - point.easting, a.northing + share * dn - point.northing)
}

/** Places along a side, as shares of it, where the boundary meets it: crossings and corners beside it. */
function crossingShares(side: Side, boundary: readonly Side[]): number[] {
  const [a, b] = side
  const shares: number[] = []
  for (const other of boundary) {
    if (!boxesNear(side, other, 2 * ALONG_BOUNDARY)) continue
    const [c, d] = other
    const before = turn(c, d, a)
    const after = turn(c, d, b)
    if (before !== after && sidesMeet(side, other)) shares.push(before / (before - after))
    if (distanceToSide(side, c) > 2 * ALONG_BOUNDARY) continue
    const [de, dn] = [b.easting - a.easting, b.northing - a.northing]
    shares.push(((c.easting - a.easting) * de + (c.northing - a.northing) * dn) / (de * de + dn * dn))
  }
  return shares.filter((share) => share > 0 && share < 1)
}

function checkInside(ring: SiteRing, boundary: SiteRing): RingCheck {
  const sides = sidesOf(boundary)
  const allowed = (point: SitePoint) =>
    sidesHold(sides, point) || sides.some((side) => distanceToSide(side, point) <= ALONG_BOUNDARY)
  const out = ring.findIndex((point) => !allowed(point))
  if (out >= 0) return refuse(`Point ${out + 1} is outside the site's boundary.`)
  for (const [i, side] of sidesOf(ring).entries()) {
    const [a, b] = side
    const cuts = [0, ...crossingShares(side, sides).sort((p, q) => p - q), 1]
    for (const [k, cut] of cuts.entries()) {
      const share = (cut + (cuts[k + 1] ?? 1)) / 2
      const middle = {
        easting: a.easting + share * (b.easting - a.easting),
        northing: a.northing + share * (b.northing - a.northing),
      }
      if (!allowed(middle)) return refuse(`Side ${i + 1}–${((i + 1) % ring.length) + 1} runs outside the site's boundary.`)
    }
  }
  return OK
}

/**
 * Whether a ring can be a site's boundary, or a zone inside one.
 * @param ring open ring in site coordinates
 * @param boundary for a zone: the site's boundary, itself a valid ring; a zone may run along it, to 0.01 of the site's unit
 * @returns ok, or the first reason in plain words; points and sides are counted from 1
 */
export function checkRing(ring: SiteRing, boundary?: SiteRing): RingCheck {
  if (ring.length < 3) return refuse('An outline needs three or more points.')
  const lost = ring.findIndex((point) => !Number.isFinite(point.easting) || !Number.isFinite(point.northing))
  if (lost >= 0) return refuse(`Point ${lost + 1} has no readable coordinates.`)
  const origin = ring[0]
  const flat = origin === undefined || sidesOf(ring).reduce((sum, [a, b]) => sum + turn(origin, a, b), 0) === 0
  const sides = checkSides(ring)
  if (!sides.ok) return sides
  if (flat) return refuse('The outline encloses no area.')
  return boundary === undefined ? OK : checkInside(ring, boundary)
}
