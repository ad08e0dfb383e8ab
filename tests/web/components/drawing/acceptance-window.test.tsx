import { render, screen } from '@testing-library/react'
import { describe, expect, it } from 'vitest'
import { AcceptanceWindow } from '#web/components/drawing/acceptance-window.tsx'
import { acceptedOutline, densityOn, missedBy, plotExtent } from '#web/components/drawing/acceptance-window-geometry.ts'
import { placeLabels, textWidth } from '#web/components/drawing/place-labels.ts'

const at = (moisture: number, density: number) => ({ moisture, density })
const RANGE = { moistureMin: 10, moistureMax: 14, densityMin: 110 }
const EXTENT = { moisture: [6, 20], density: [100, 125] } as const

describe('the accepted ground of the plot', () => {
  it('reads a line between its points and level beyond its ends', () => {
    const line = [at(10, 120), at(12, 110)]
    expect([9, 10, 11, 12, 13].map((moisture) => densityOn(line, moisture))).toEqual([120, 120, 115, 110, 110])
    expect(densityOn([], 10)).toBeNull()
  })

  it('never rises above the zero-air-voids line nor falls below the least density', () => {
    const zav = [at(6, 130), at(20, 102)]
    const outline = acceptedOutline(RANGE, zav, EXTENT)
    for (const { moisture, density } of outline) {
      expect(density).toBeLessThanOrEqual(Math.max(RANGE.densityMin, densityOn(zav, moisture) ?? 0) + 1e-9)
      expect(density).toBeGreaterThanOrEqual(RANGE.densityMin)
      expect(moisture).toBeGreaterThanOrEqual(10)
      expect(moisture).toBeLessThanOrEqual(14)
    }
  })

  it('is empty when its sides cross', () => {
    expect(acceptedOutline({ ...RANGE, moistureMin: 15 }, [], EXTENT)).toEqual([])
  })

  it('reaches the edges of the plot where a side is open', () => {
    const moistures = acceptedOutline({ densityMin: 110 }, [], EXTENT).map((point) => point.moisture)
    expect([Math.min(...moistures), Math.max(...moistures)]).toEqual([6, 20])
  })

  it('says by how much a test misses, sideways before upwards', () => {
    expect(missedBy(at(9, 112), RANGE)).toEqual(at(10, 112))
    expect(missedBy(at(15, 100), RANGE)).toEqual(at(14, 100))
    expect(missedBy(at(12, 108), RANGE)).toEqual(at(12, 110))
    expect(missedBy(at(12, 112), RANGE)).toBeNull()
  })

  it('leaves room for every point and the window', () => {
    const extent = plotExtent([at(9.8, 112.7), at(16.6, 104.4)], RANGE, { moisture: 2, density: 5 })
    expect(extent).toEqual({ moisture: [8, 18], density: [100, 120] })
  })
})

describe('labels of a drawing', () => {
  const frame = { x: 0, y: 0, width: 200, height: 100 }

  it('takes the first place clear of obstacles and of one another', () => {
    const wish = (id: string) => ({ id, text: 'limit', fontSize: 10, places: [{ x: 10, y: 20 }, { x: 10, y: 50 }, { x: 10, y: 80 }] })
    const placed = placeLabels([wish('a'), wish('b')], [{ x: 0, y: 8, width: 40, height: 14 }], frame)
    expect(placed.map(({ y }) => y)).toEqual([50, 80])
  })

  it('moves a label into the frame rather than cutting it off', () => {
    const [label] = placeLabels([{ id: 'a', text: 'zero air voids', fontSize: 10, places: [{ x: 190, y: 2 }] }], [], frame)
    expect(label).toMatchObject({ x: 200 - textWidth('zero air voids', 10), y: 10 })
  })
})

describe('the acceptance window', () => {
  it('draws its words once each and is said in a sentence', () => {
    render(
      <AcceptanceWindow
        label="Too dry: 9.8 %, 112.7 pcf"
        densityUnit="pcf"
        curve={[at(8, 108), at(12.6, 117.6), at(17, 106)]}
        zav={{ points: [at(6, 140), at(20, 109)], label: 'zero air voids, Gs 2.68' }}
        accepted={RANGE}
        limit={{ density: 110, label: '95 % of 117.6' }}
        tests={[{ id: 'T-1', moisture: 9.8, density: 112.7, outcome: 'fails', current: true }]}
      />,
    )
    const plot = screen.getByRole('img', { name: 'Too dry: 9.8 %, 112.7 pcf' })
    for (const words of ['zero air voids, Gs 2.68', '95 % of 117.6', 'meets spec', 'Dry density, pcf', 'Moisture, %']) {
      expect([...plot.querySelectorAll('text')].filter((text) => text.textContent === words), words).toHaveLength(1)
    }
  })
})
