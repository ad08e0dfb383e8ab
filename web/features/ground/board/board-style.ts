import type { StyleSpecification } from 'maplibre-gl'
import { SHEET_COLOURS, type Theme } from '#shared/look/theme.ts'
import { contourSegments } from './board-contours.ts'
import type { BoardProjection } from './board-projection.ts'
import type { BoardMark, BoardSite } from './board-types.ts'

export const LAYER = {
  background: 'background',
  contours: 'contours',
  cells: 'cells',
  mask: 'mask',
  zones: 'zones',
  boundary: 'boundary',
  marks: 'marks',
} as const

type Geometry = GeoJSON.Geometry
type Features = GeoJSON.FeatureCollection

const collection = (geometries: readonly Geometry[]): Features => ({
  type: 'FeatureCollection',
  features: geometries.map((geometry) => ({ type: 'Feature', properties: {}, geometry })),
})

function ringOf(projection: BoardProjection, ring: BoardSite['boundary']): number[][] {
  const points = ring.map((point) => [...projection.siteToLonLat(point)])
  return points.length === 0 ? [] : [...points, [...points[0]!]]
}

/** The sheet with one cell to spare, with the site cut out of it. */
function maskOf(projection: BoardProjection, boundary: number[][]): Geometry {
  const { columns, rows } = projection.grid
  const corners = [[-1, -1], [columns + 1, -1], [columns + 1, rows + 1], [-1, rows + 1], [-1, -1]] as const
  return { type: 'Polygon', coordinates: [corners.map(([column, row]) => [...projection.sheetToLonLat(column, row)]), boundary] }
}

function contoursOf(projection: BoardProjection, site: BoardSite): Geometry {
  const segments = contourSegments(site.cells, site.grid, site.grid.unit)
  const coordinates = segments.map((ends) => ends.map(({ column, row }) => [...projection.sheetToLonLat(column, row)]))
  return { type: 'MultiLineString', coordinates }
}

export function marksData(projection: BoardProjection, marks: readonly BoardMark[]): Features {
  return {
    type: 'FeatureCollection',
    features: marks.map((mark, order) => ({
      type: 'Feature',
      properties: { image: markImageName(mark), order: MARK_ORDER[mark.outcome] * 100_000 + order },
      geometry: { type: 'Point', coordinates: [...projection.siteToLonLat(mark)] },
    })),
  }
}

/** What must not be hidden is drawn last. */
const MARK_ORDER: Readonly<Record<BoardMark['outcome'], number>> = { pending: 0, pass: 1, near: 2, suspect: 3, fail: 4 }

export function markImageName(mark: Pick<BoardMark, 'outcome' | 'verification'>): string {
  return mark.verification ? `${mark.outcome}-verification` : mark.outcome
}

/** Colours of the ordinary layers, by layer and paint property. */
export function themePaint(theme: Theme): readonly (readonly [layer: string, property: string, colour: string])[] {
  const sheet = SHEET_COLOURS[theme]
  return [
    [LAYER.background, 'background-color', sheet.sheet.css],
    [LAYER.contours, 'line-color', theme === 'light' ? '#c3cfcc' : sheet.rule.css],
    [LAYER.mask, 'fill-color', sheet.sheet.css],
    [LAYER.zones, 'line-color', sheet.ink.css],
    [LAYER.boundary, 'line-color', sheet.ink.css],
  ]
}

/** Everything but the cells, from nothing but the site: no tiles, no glyphs, no network. */
export function boardStyle(site: BoardSite, projection: BoardProjection, marks: readonly BoardMark[], theme: Theme): StyleSpecification {
  const colour = new Map(themePaint(theme).map(([layer, , css]) => [layer, css] as const))
  const boundary = ringOf(projection, site.boundary)
  const source = (data: Features) => ({ type: 'geojson', data, tolerance: 0, buffer: 64, maxzoom: 22 }) as const
  return {
    version: 8,
    sources: {
      contours: source(collection([contoursOf(projection, site)])),
      mask: source(collection([maskOf(projection, boundary)])),
      // one leg more than a closed ring, so that the last corner is joined as the others are
      boundary: source(collection([{ type: 'LineString', coordinates: [...boundary, ...boundary.slice(1, 2)] }])),
      zones: source(collection(site.zones.map((zone) => ({ type: 'LineString', coordinates: ringOf(projection, zone.ring) })))),
      marks: source(marksData(projection, marks)),
    },
    layers: [
      { id: LAYER.background, type: 'background', paint: { 'background-color': colour.get(LAYER.background)! } },
      { id: LAYER.contours, type: 'line', source: 'contours', paint: { 'line-color': colour.get(LAYER.contours)!, 'line-width': 0.9 } },
      {
        id: LAYER.mask,
        type: 'fill',
        source: 'mask',
        paint: { 'fill-color': colour.get(LAYER.mask)!, 'fill-antialias': false },
      },
      {
        id: LAYER.zones,
        type: 'line',
        source: 'zones',
        paint: { 'line-color': colour.get(LAYER.zones)!, 'line-width': 1.6, 'line-dasharray': [8, 2.5, 1.5, 2.5] },
      },
      {
        id: LAYER.boundary,
        type: 'line',
        source: 'boundary',
        layout: { 'line-join': 'miter', 'line-cap': 'square' },
        paint: { 'line-color': colour.get(LAYER.boundary)!, 'line-width': 2.2 },
      },
      {
        id: LAYER.marks,
        type: 'symbol',
        source: 'marks',
        layout: {
          'icon-image': ['get', 'image'],
          'icon-allow-overlap': true,
          'icon-ignore-placement': true,
          'symbol-sort-key': ['get', 'order'],
        },
      },
    ],
  }
}
