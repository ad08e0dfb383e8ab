import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { CoordinateSystem } from '#shared/domain/coordinate-systems.ts'
import { COORDINATE_SYSTEMS, findCoordinateSystem, toLonLat, toSite } from '#shared/domain/coordinate-systems.ts'
import { SEEDED } from './plan-arbitraries.ts'

function system(code: string): CoordinateSystem {
  const found = findCoordinateSystem(code)
  if (found === undefined) throw new Error(`${code} is not on the list`)
  return found
}

describe('coordinate systems', () => {
  // C-1: EPSG Guidance Note 7-2, Lambert Conic Conformal (2SP), worked example, on NAD27's own ellipsoid
  it('places the Lambert example of the EPSG guidance note within 0.01 ft', () => {
    const texas = system('EPSG:32040')
    const unshifted = { ...texas, proj4: texas.proj4.replace(' +towgs84=-8,160,176', '') }
    const { easting, northing } = toSite(unshifted, [-96, 28.5])
    expect(easting).toBeCloseTo(2963503.91, 2)
    expect(northing).toBeCloseTo(254759.8, 2)
    const [longitude, latitude] = toLonLat(unshifted, { easting: 2963503.91, northing: 254759.8 })
    expect(longitude).toBeCloseTo(-96, 7)
    expect(latitude).toBeCloseTo(28.5, 7)
  })

  // C-3: the same point in international feet is 5.93 ft further east
  it('does not mix the two feet', () => {
    const texas = system('EPSG:32040')
    const unshifted = texas.proj4.replace(' +towgs84=-8,160,176', '')
    const { easting } = toSite({ ...texas, proj4: unshifted.replace('us-ft', 'ft'), unit: 'ft' }, [-96, 28.5])
    expect(easting).toBeCloseTo(2963509.84, 2)
  })

  // central reference point of RD New, as given for EPSG:28992: 52.155172 N, 5.387204 E
  it('places the reference point of the Dutch grid, where a wrong rotation unit is 170 m off', () => {
    const [longitude, latitude] = toLonLat(system('EPSG:28992'), { easting: 155_000, northing: 463_000 })
    expect(longitude).toBeCloseTo(5.387204, 6)
    expect(latitude).toBeCloseTo(52.155172, 6)
  })

  // by definition of UTM: false easting 500 000 m on the central meridian, southern false northing 10 000 000 m
  it('puts the central meridian of a UTM zone at 500,000 m', () => {
    expect(toSite(system('EPSG:26910'), [-123, 0]).easting).toBeCloseTo(500_000, 6)
    expect(toSite(system('EPSG:32632'), [9, 0]).northing).toBeCloseTo(0, 6)
    expect(toSite(system('EPSG:32733'), [15, 0]).northing).toBeCloseTo(10_000_000, 6)
    expect(toSite(system('EPSG:25832'), [9, 48]).easting).toBeCloseTo(500_000, 6)
  })

  it('lists each code once, with a unit that its definition states', () => {
    expect(new Set(COORDINATE_SYSTEMS.map(({ code }) => code)).size).toBe(COORDINATE_SYSTEMS.length)
    const wrong = COORDINATE_SYSTEMS.filter(({ proj4, unit }) => !proj4.includes(` +units=${unit} `))
    expect(wrong).toEqual([])
    expect(new Set(COORDINATE_SYSTEMS.map(({ unit }) => unit))).toEqual(new Set(['m', 'ft', 'us-ft']))
    expect(findCoordinateSystem('EPSG:1')).toBeUndefined()
  })

  it('needs no grid file and comes back within 1 mm in every system', () => {
    const anySystem = fc.constantFrom(...COORDINATE_SYSTEMS)
    // a conic's latitude is found by iteration to 1e-10 radian, 0.6 mm on the ground; practice.md item 13 allows 3 mm
    const share = fc.double({ min: -1, max: 1, noNaN: true })
    fc.assert(
      fc.property(anySystem, share, share, (chosen, east, north) => {
        // some kilometres round the false origin, a few degrees off the equator for UTM
        const unit = chosen.unit === 'm' ? 1000 : 3048
        const x0 = Number(/\+x_0=([\d.]+)/.exec(chosen.proj4)?.[1] ?? 500_000)
        const y0 = Number(/\+y_0=([\d.]+)/.exec(chosen.proj4)?.[1] ?? 5_000_000)
        const inUnit = chosen.unit === 'm' ? 1 : 0.3048
        const point = { easting: x0 / inUnit + 50 * unit * east, northing: y0 / inUnit + 50 * unit * north }
        const back = toSite(chosen, toLonLat(chosen, point))
        expect(Math.hypot(back.easting - point.easting, back.northing - point.northing)).toBeLessThan(1e-3 / inUnit)
      }),
      { ...SEEDED, numRuns: 400 },
    )
  })
})
