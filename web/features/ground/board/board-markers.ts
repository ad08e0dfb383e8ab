import { Marker, type Map as MapLibreMap } from 'maplibre-gl'
import { STAKE_COLOUR, WHITE } from '#shared/look/theme.ts'
import type { BoardProjection } from './board-projection.ts'
import type { BoardStake, BoardZone } from './board-types.ts'

const SVG = 'http://www.w3.org/2000/svg'

function drawn(name: string, attributes: Readonly<Record<string, string | number>>, text?: string): SVGElement {
  const element = document.createElementNS(SVG, name)
  for (const [key, value] of Object.entries(attributes)) element.setAttribute(key, String(value))
  if (text !== undefined) element.textContent = text
  return element
}

/** The flag of a stake: foot at the lower left, where the hole goes. */
function stakeFlag(label: string): SVGElement {
  const cloth = 11 + 7 * label.length
  const pole = { d: 'M6 34V9', 'stroke-linecap': 'round' }
  const svg = drawn('svg', { width: cloth + 10, height: 40, viewBox: `0 0 ${cloth + 10} 40`, 'aria-hidden': 'true' })
  svg.append(
    drawn('path', { ...pole, stroke: WHITE.css, 'stroke-width': 5 }),
    drawn('path', { ...pole, stroke: STAKE_COLOUR.css, 'stroke-width': 2.4 }),
    drawn('path', { d: `M6 8h${cloth}l-5 7.5l5 7.5h-${cloth}z`, fill: STAKE_COLOUR.css, stroke: WHITE.css, 'stroke-width': 1.2 }),
    drawn('text', { x: 10, y: 19.4, fill: WHITE.css, class: 'board-stake-label' }, label),
    drawn('circle', { cx: 6, cy: 34, r: 2.8, fill: STAKE_COLOUR.css, stroke: WHITE.css, 'stroke-width': 1 }),
  )
  return svg
}

/** Stakes as buttons on the map. */
export function createStakeMarkers(map: MapLibreMap, projection: BoardProjection, open: (id: string) => void): (stakes: readonly BoardStake[]) => void {
  let markers: Marker[] = []
  return (stakes) => {
    for (const marker of markers) marker.remove()
    markers = stakes.map((stake) => {
      const element = document.createElement('button')
      element.type = 'button'
      element.className = 'board-stake'
      element.append(stakeFlag(stake.label))
      element.addEventListener('click', () => open(stake.id))
      const marker = new Marker({ element, anchor: 'bottom-left', offset: [-6, 6] }).setLngLat([...projection.siteToLonLat(stake)]).addTo(map)
      // the map writes a general label of its own when it takes the element
      element.setAttribute('aria-label', `Stake ${stake.label}, test here next`)
      return marker
    })
  }
}

interface ZoneLabel {
  readonly marker: Marker
  readonly element: HTMLElement
  /** extent of the zone in cells along a row */
  readonly columns: number
}

/** Name of each zone inside its upper left corner, hidden while the zone is smaller than its name. */
export function createZoneLabels(map: MapLibreMap, projection: BoardProjection, cellPixels: () => number): (zones: readonly BoardZone[]) => void {
  let labels: ZoneLabel[] = []
  const fitNames = (): void => {
    const side = cellPixels()
    for (const { element, columns } of labels) {
      element.style.visibility = columns * side < element.offsetWidth + 12 ? 'hidden' : 'visible'
    }
  }
  map.on('zoom', fitNames)
  map.on('resize', fitNames)
  return (zones) => {
    for (const { marker } of labels) marker.remove()
    labels = zones.flatMap((zone) => {
      const places = zone.ring.map((point) => projection.siteToSheet(point))
      const corner = places.reduce((best, place) => (place.column + place.row < best.column + best.row ? place : best), places[0]!)
      const columns = Math.max(...places.map((place) => place.column)) - Math.min(...places.map((place) => place.column))
      const element = document.createElement('div')
      element.className = 'board-zone-label'
      element.textContent = zone.name
      const marker = new Marker({ element, anchor: 'top-left', offset: [6, 6] })
        .setLngLat([...projection.sheetToLonLat(corner.column, corner.row)])
        .addTo(map)
      element.removeAttribute('aria-label')
      element.removeAttribute('role')
      element.removeAttribute('tabindex')
      return [{ marker, element, columns }]
    })
    fitNames()
  }
}
