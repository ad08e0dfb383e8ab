import proj4 from 'proj4'
import type { Converter } from 'proj4'
import { STATE_PLANE_SYSTEMS } from './state-plane-systems.ts'
import type { PlanUnit, SitePoint } from './site-geometry.ts'

/** A projected coordinate system that a site can be laid out in. */
export interface CoordinateSystem {
  /** such as EPSG:2285 */
  readonly code: string
  readonly name: string
  /** definition in the form proj4 reads; self-contained, no grid files */
  readonly proj4: string
  readonly unit: PlanUnit
  /** the datum, and how far its place on the map can be trusted */
  readonly datum: string
}

/** Longitude and latitude in degrees, WGS 84, in the order maps take them. */
export type LonLat = readonly [longitude: number, latitude: number]

export const NAD83 = 'NAD83, drawn on the map as WGS 84 (they differ by 1 to 2 m)'
const ETRS89 = 'ETRS89, drawn on the map as WGS 84 (they differ by less than 1 m)'

const OTHER_SYSTEMS: readonly CoordinateSystem[] = [
  {
    code: 'EPSG:32040',
    name: 'NAD27 / Texas South Central',
    proj4:
      '+proj=lcc +lat_0=27.8333333333333 +lon_0=-99 +lat_1=28.3833333333333 +lat_2=30.2833333333333 +x_0=609601.219202438 +y_0=0 +ellps=clrk66 +towgs84=-8,160,176 +units=us-ft +no_defs',
    unit: 'us-ft',
    datum: 'NAD27, drawn on the map by one mean shift for the conterminous states (good to about 10 m)',
  },
  {
    code: 'EPSG:25832',
    name: 'ETRS89 / UTM zone 32N',
    proj4: '+proj=utm +zone=32 +ellps=GRS80 +towgs84=0,0,0 +units=m +no_defs',
    unit: 'm',
    datum: ETRS89,
  },
  {
    code: 'EPSG:25833',
    name: 'ETRS89 / UTM zone 33N',
    proj4: '+proj=utm +zone=33 +ellps=GRS80 +towgs84=0,0,0 +units=m +no_defs',
    unit: 'm',
    datum: ETRS89,
  },
  {
    code: 'EPSG:28992',
    name: 'Amersfoort / RD New',
    // some published lists give the three rotations in microradians with the other sign, 170 m off; these are arc-seconds
    proj4:
      '+proj=sterea +lat_0=52.1561605555556 +lon_0=5.38763888888889 +k=0.9999079 +x_0=155000 +y_0=463000 +ellps=bessel +towgs84=565.4171,50.3319,465.5524,-0.398957,0.343988,-1.87740,4.0725 +units=m +no_defs',
    unit: 'm',
    datum: 'Amersfoort, drawn on the map by a seven-parameter shift (good to about 0.5 m)',
  },
]

function twoDigits(zone: number): string {
  return String(zone).padStart(2, '0')
}

function utmSystem(code: string, zone: number, south: boolean, datum: 'WGS 84' | 'NAD83'): CoordinateSystem {
  const ellipsoid = datum === 'WGS 84' ? '+ellps=WGS84' : '+ellps=GRS80'
  return {
    code,
    name: `${datum} / UTM zone ${zone}${south ? 'S' : 'N'}`,
    proj4: `+proj=utm +zone=${zone}${south ? ' +south' : ''} ${ellipsoid} +towgs84=0,0,0 +units=m +no_defs`,
    unit: 'm',
    datum: datum === 'WGS 84' ? 'WGS 84' : NAD83,
  }
}

/** UTM: WGS 84 zones 1 to 60 north (EPSG:326zz) and south (327zz), NAD83 zones 1 to 23 north (269zz). */
function utmSystems(): CoordinateSystem[] {
  const systems: CoordinateSystem[] = []
  for (let zone = 1; zone <= 23; zone++) systems.push(utmSystem(`EPSG:269${twoDigits(zone)}`, zone, false, 'NAD83'))
  for (let zone = 1; zone <= 60; zone++) systems.push(utmSystem(`EPSG:326${twoDigits(zone)}`, zone, false, 'WGS 84'))
  for (let zone = 1; zone <= 60; zone++) systems.push(utmSystem(`EPSG:327${twoDigits(zone)}`, zone, true, 'WGS 84'))
  return systems
}

/** Every system a site can choose, state plane first. Parameters as in the EPSG data set. */
export const COORDINATE_SYSTEMS: readonly CoordinateSystem[] = [
  ...STATE_PLANE_SYSTEMS.map((system) => ({ ...system, datum: NAD83 })),
  ...OTHER_SYSTEMS,
  ...utmSystems(),
]

/** The system of a code such as EPSG:2285, or undefined when it is not on the list. */
export function findCoordinateSystem(code: string): CoordinateSystem | undefined {
  return COORDINATE_SYSTEMS.find((system) => system.code === code)
}

const converters = new Map<string, Converter>()

function converterOf(system: CoordinateSystem): Converter {
  const known = converters.get(system.proj4)
  if (known !== undefined) return known
  const made = proj4(system.proj4)
  converters.set(system.proj4, made)
  return made
}

/**
 * Site coordinates as longitude and latitude.
 * @param system the site's coordinate system
 * @param point easting and northing in that system's unit, finite
 * @returns degrees, WGS 84 as far as the system's datum says
 */
export function toLonLat(system: CoordinateSystem, point: SitePoint): LonLat {
  const [longitude, latitude] = converterOf(system).inverse([point.easting, point.northing])
  return [longitude, latitude]
}

/**
 * Longitude and latitude as site coordinates, the reverse of toLonLat.
 * @param system the site's coordinate system
 * @param lonLat degrees, WGS 84
 * @returns easting and northing in the system's unit, not rounded
 */
export function toSite(system: CoordinateSystem, [longitude, latitude]: LonLat): SitePoint {
  const [easting, northing] = converterOf(system).forward([longitude, latitude])
  return { easting, northing }
}
