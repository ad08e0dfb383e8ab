import fc from 'fast-check'
import type { GridDefinition, SitePoint } from '#shared/domain/site-geometry.ts'

const finite = (min: number, max: number) => fc.double({ min, max, noNaN: true })

/** Grids of any unit and rotation at state-plane sized coordinates. */
export const anyGrid: fc.Arbitrary<GridDefinition> = fc.record({
  origin: fc.record({ easting: finite(-3e6, 3e6), northing: finite(-3e6, 8e6) }),
  cellSize: finite(2, 100),
  columns: fc.integer({ min: 1, max: 60 }),
  rows: fc.integer({ min: 1, max: 60 }),
  rotationDeg: finite(-180, 180),
  unit: fc.constantFrom('m', 'ft', 'us-ft'),
})

/**
 * Simple polygons that need not be convex: one point at a random distance on each of several spokes.
 * Coordinates are offsets from a centre, in the site's unit.
 */
export const anyPolygon: fc.Arbitrary<SitePoint[]> = fc
  .array(finite(40, 400), { minLength: 3, maxLength: 24 })
  .map((radii) =>
    radii.map((radius, i) => {
      const angle = (2 * Math.PI * (i + 0.3)) / radii.length
      return { easting: 1_200_000 + radius * Math.cos(angle), northing: 640_000 + radius * Math.sin(angle) }
    }),
  )

export const SEEDED = { seed: 20261201 } as const
