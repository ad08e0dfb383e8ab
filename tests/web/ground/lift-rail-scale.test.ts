import { describe, expect, it } from 'vitest'
import type { GroundCut } from '#shared/ground-codec.ts'
import { buildBoard, buildTwoZoneSite, COURT_ID } from '#tests/factories/ground-view.ts'
import { buildSiteView, ZONE_ID } from '#tests/factories/site-view.ts'
import { bandAt, railScales, stepCut } from '#web/features/ground/rail/rail-scale.ts'

const SURFACE: GroundCut = { kind: 'surface' }
const { zones } = buildSiteView()

describe('the rulers of the lift rail', () => {
  it('are one for zones whose lifts lie alike, with the shares of both', () => {
    const [pad] = zones
    if (pad === undefined) throw new Error('no zone')
    const twin = { ...pad, id: COURT_ID, index: 1, name: 'Truck court' }
    const lifts = [...buildBoard().lifts, { zoneId: COURT_ID, lift: 1, states: [{ state: 'awaiting-test' as const, cells: 3, cm3: 0 }] }]
    const [scale, ...more] = railScales([pad, twin], lifts)
    expect(more).toEqual([])
    const lowest = scale?.bands.at(-1)
    expect(lowest?.shares).toEqual([
      { state: 'released', share: 0.5 },
      { state: 'awaiting-test', share: 0.25 },
      { state: 'rework', share: 0.25 },
    ])
    expect(lowest?.words).toBe('50 % released, 25 % awaiting test, 25 % rework')
  })

  it('are one a zone where thicknesses differ', () => {
    expect(railScales(buildTwoZoneSite().zones, []).map(({ name, bands }) => [name, bands.length])).toEqual([
      ['Building pad', 10],
      // 2.032 m by lifts of 6 in: 13 and a third
      ['Truck court', 14],
    ])
  })

  it('leave out a band that no cell has', () => {
    expect(railScales(zones, buildBoard().lifts)[0]?.bands.map(({ lift }) => lift)).toEqual([2, 1])
  })
})

describe('cutting by the rail', () => {
  const [scale] = railScales(zones, [])
  const middle = (lift: number): GroundCut => ({ kind: 'elevation', um: (lift - 0.5) * 203_200 })

  it('cuts a lift at its middle', () => {
    expect(scale?.bands.find(({ lift }) => lift === 3)?.middleUm).toBe(508_000)
    expect(bandAt(scale, middle(3))?.lift).toBe(3)
    expect(bandAt(scale, SURFACE)).toBeUndefined()
  })

  it('steps down from the surface to the highest lift, and back', () => {
    expect(stepCut(scale, SURFACE, -1)).toEqual(middle(10))
    expect(stepCut(scale, middle(10), 1)).toEqual(SURFACE)
    expect(stepCut(scale, middle(5), -1)).toEqual(middle(4))
    expect(stepCut(scale, middle(5), 1)).toEqual(middle(6))
  })

  it('stays at either end', () => {
    expect(stepCut(scale, SURFACE, 1)).toEqual(SURFACE)
    expect(stepCut(scale, middle(1), -1)).toEqual(middle(1))
    expect(stepCut(undefined, SURFACE, -1)).toEqual(SURFACE)
  })

  it('knows the zone of its only ruler', () => {
    expect(scale?.zoneIds).toEqual([ZONE_ID])
  })
})
