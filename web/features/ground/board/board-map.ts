import maplibreWorkerUrl from 'maplibre-gl/dist/maplibre-gl-worker.mjs?url'
import { Map as MapLibreMap, setWorkerUrl, type GeoJSONSource } from 'maplibre-gl'
import type { GroundSheet } from '#shared/ground-codec.ts'
import type { SitePoint } from '#shared/domain/site-geometry.ts'
import { MARGIN, fitCamera, sheetFrame } from './board-camera.ts'
import { createBoardLayer } from './board-layer.ts'
import { drawMarkImages } from './board-mark-images.ts'
import { createStakeMarkers, createZoneLabels } from './board-markers.ts'
import { createBoardProjection, type BoardProjection, type SheetPlace } from './board-projection.ts'
import { LAYER, boardStyle, marksData, themePaint } from './board-style.ts'
import type { BoardMark, BoardSite, BoardStake, BoardTheme, GroundMapHandle, GroundMapProps } from './board-types.ts'

setWorkerUrl(maplibreWorkerUrl)

export interface BoardMapOptions {
  readonly container: HTMLElement
  readonly site: BoardSite
  readonly theme: BoardTheme
  readonly allowRotation: boolean
  readonly label: string
  readonly fitPadding: GroundMapProps['fitPadding']
  readonly onOpenStake: (id: string) => void
}

/** The live map: everything that is done to it from outside, without React. */
export interface BoardMap extends Omit<GroundMapHandle, 'patchCells'> {
  readonly map: MapLibreMap
  readonly projection: BoardProjection
  readonly site: BoardSite
  readonly setSheet: (sheet: GroundSheet, from: SitePoint | null) => void
  readonly patchCells: (sheet: GroundSheet, cells: readonly number[], from: SitePoint | null) => void
  readonly setMarks: (marks: readonly BoardMark[]) => void
  readonly setStakes: (stakes: readonly BoardStake[]) => void
  readonly setChosen: (cells: readonly number[]) => void
  readonly setPreview: (cells: readonly number[]) => void
  readonly setTheme: (theme: BoardTheme) => void
  readonly placeAt: (x: number, y: number) => SheetPlace
  readonly siteAt: (x: number, y: number) => SitePoint
  readonly cellAt: (place: SheetPlace) => number | undefined
  readonly markAt: (x: number, y: number) => BoardMark | undefined
  readonly remove: () => void
}

/** Nearest that a click must come to a mark, CSS pixels. */
const MARK_REACH = 11

function sameCut(a: GroundSheet['cut'], b: GroundSheet['cut']): boolean {
  return a.kind === 'surface' ? b.kind === 'surface' : b.kind === 'elevation' && a.um === b.um
}

function newMap(options: BoardMapOptions, projection: BoardProjection): MapLibreMap {
  const { container, site, theme, allowRotation } = options
  const camera = fitCamera(projection, site.boundary, { width: container.clientWidth, height: container.clientHeight }, options.fitPadding)
  const map = new MapLibreMap({
    container,
    style: boardStyle(site, projection, [], theme),
    ...camera,
    minZoom: Math.max(0, camera.zoom - 3),
    maxZoom: 24,
    maxPitch: 0,
    attributionControl: false,
    renderWorldCopies: false,
    boxZoom: false,
    doubleClickZoom: false,
    keyboard: false,
    dragRotate: allowRotation,
    pitchWithRotate: false,
    touchPitch: false,
    fadeDuration: 0,
  })
  if (!allowRotation) map.touchZoomRotate.disableRotation()
  map.getCanvas().setAttribute('aria-label', options.label)
  return map
}

function lookupCells(site: BoardSite): (place: SheetPlace) => number | undefined {
  const { columns, rows } = site.grid
  const cellAt = new Map<number, number>()
  for (let cell = 0; cell < site.cells.column.length; cell++) cellAt.set(site.cells.row[cell]! * columns + site.cells.column[cell]!, cell)
  return ({ column, row }) => {
    const c = Math.floor(column)
    const r = Math.floor(row)
    return c < 0 || r < 0 || c >= columns || r >= rows ? undefined : cellAt.get(r * columns + c)
  }
}

/** Builds the map of a site in an element. */
export function createBoardMap(options: BoardMapOptions): BoardMap {
  const { site } = options
  const projection = createBoardProjection(site.grid, site.system)
  const map = newMap(options, projection)
  let theme = options.theme
  let marks: readonly BoardMark[] = []
  let shown: GroundSheet['cut'] | undefined
  let styled = false
  const layer = createBoardLayer({
    id: LAYER.cells,
    projection,
    cells: site.cells,
    theme,
    now: () => performance.now(),
    reducedMotion: () => matchMedia('(prefers-reduced-motion: reduce)').matches,
  })
  const pixel = (column: number, row: number): { x: number; y: number } => map.project([...projection.sheetToLonLat(column, row)])
  const cellPixels = (): number => {
    const frame = sheetFrame(map, projection)
    return Math.hypot(frame.columnX, frame.columnY)
  }
  const setStakes = createStakeMarkers(map, projection, options.onOpenStake)
  createZoneLabels(map, projection, cellPixels)(site.zones)

  const fillMarks = (): void => {
    if (styled) void map.getSource<GeoJSONSource>('marks')?.setData(marksData(projection, marks))
  }
  const paint = (): void => {
    if (!styled) return
    for (const [id, property, colour] of themePaint(theme)) map.setPaintProperty(id, property as 'line-color', colour)
  }
  // comes at the start, and again when a lost graphics context has been given back: the map restores its own
  // layers then, but not custom ones
  map.on('webglcontextlost', () => {
    styled = false
  })
  map.on('style.load', () => {
    styled = true
    for (const { name, image, pixelRatio } of drawMarkImages(devicePixelRatio)) {
      if (!map.hasImage(name)) map.addImage(name, image, { pixelRatio })
    }
    if (map.getLayer(LAYER.cells) === undefined) map.addLayer(layer, LAYER.mask)
    fillMarks()
    paint()
  })

  const place = (from: SitePoint | null): SheetPlace | undefined => (from === null ? undefined : projection.siteToSheet(from))
  const centreOf = (cell: number): SheetPlace | undefined => {
    const column = site.cells.column[cell]
    const row = site.cells.row[cell]
    return column === undefined || row === undefined ? undefined : { column: column + 0.5, row: row + 0.5 }
  }
  const projectCellCenter = (cell: number): { x: number; y: number } | undefined => {
    const centre = centreOf(cell)
    if (centre === undefined) return undefined
    const { x, y } = pixel(centre.column, centre.row)
    return { x, y }
  }

  return {
    map,
    projection,
    site,
    setSheet(sheet, from) {
      const inkIn = shown !== undefined && sameCut(shown, sheet.cut)
      layer.setSheet(sheet, inkIn ? (place(from) ?? 'middle') : undefined)
      shown = sheet.cut
    },
    patchCells: (sheet, cells, from) => layer.patchCells(sheet, cells, place(from)),
    setMarks(next) {
      marks = next
      fillMarks()
    },
    setStakes,
    setChosen: layer.setChosen,
    setPreview: layer.setPreview,
    setTheme(next) {
      if (next === theme) return
      theme = next
      layer.setTheme(next)
      paint()
    },
    fit() {
      const { clientWidth: width, clientHeight: height } = map.getContainer()
      map.easeTo({ ...fitCamera(projection, site.boundary, { width, height }, options.fitPadding), duration: 200 })
    },
    panToCell(cell) {
      const centre = centreOf(cell)
      const at = projectCellCenter(cell)
      if (centre === undefined || at === undefined) return
      const { clientWidth: width, clientHeight: height } = map.getContainer()
      const half = cellPixels() / 2
      const inside = at.x > MARGIN + half && at.y > MARGIN + half && at.x < width - half && at.y < height - half
      if (!inside) map.easeTo({ center: [...projection.sheetToLonLat(centre.column, centre.row)], duration: 200 })
    },
    projectCellCenter,
    placeAt(x, y) {
      const { lng, lat } = map.unproject([x, y])
      return projection.lonLatToSheet([lng, lat])
    },
    siteAt(x, y) {
      const { lng, lat } = map.unproject([x, y])
      return projection.lonLatToSite([lng, lat])
    },
    cellAt: lookupCells(site),
    markAt(x, y) {
      let nearest: BoardMark | undefined
      let reach = MARK_REACH
      for (const mark of marks) {
        const at = map.project([...projection.siteToLonLat(mark)])
        const distance = Math.hypot(at.x - x, at.y - y)
        if (distance < reach) [nearest, reach] = [mark, distance]
      }
      return nearest
    },
    remove: () => map.remove(),
  }
}
