import { describe, expect, it } from 'vitest'
import { layOutChart, levelText } from '#web/features/frequency/volume-chart-layout.ts'
import { textWidth } from '#web/components/drawing/place-labels.ts'

const FRAME = { width: 960, left: 52, right: 946, top: 26, bottom: 246 }
const day = (number: number) => new Date(Date.UTC(2026, 9, 18 + number)).toISOString().slice(0, 10)
const rising = (days: number, spokenShare = 0.9) => Array.from({ length: days }, (_, index) => ({ day: day(index + 1), placedCm3: (index + 1) * 1000, spokenCm3: Math.round((index + 1) * 1000 * spokenShare) }))
const write = (cm3: number) => cm3.toLocaleString('en-US')
const plain = (cm3: number) => cm3

describe('the chart of volume placed and spoken for', () => {
  it('has nothing to draw before anything is placed', () => {
    expect(layOutChart([], plain, FRAME, write)).toBeNull()
  })

  it('says the last day’s figures, inside the frame', () => {
    const layout = layOutChart(rising(40), plain, FRAME, write)
    const [placed, spoken] = layout?.labels ?? []
    expect([placed?.text, spoken?.text]).toEqual(['40,000 placed', '36,000 spoken for'])
    for (const label of layout?.labels ?? []) {
      expect(label.x).toBeLessThanOrEqual(FRAME.right)
      expect(label.x - textWidth(label.text, 13)).toBeGreaterThanOrEqual(FRAME.left)
      expect(label.y).toBeGreaterThan(10)
      expect(label.y).toBeLessThan(FRAME.bottom)
    }
  })

  it('puts the second label above the lines where the area is too low for it', () => {
    const layout = layOutChart(rising(40, 0.02), plain, FRAME, write)
    expect(layout?.labels[1].y).toBe(layout?.labels[0].y)
    expect((layout?.labels[1].x ?? 0) + 8).toBeLessThan((layout?.labels[0].x ?? 0) - textWidth('40,000 placed', 13))
  })

  it('names so many days that their names stand clear of each other, also on a phone', () => {
    for (const width of [360, 960]) {
      for (const count of [1, 2, 9, 31, 60, 400]) {
        const layout = layOutChart(rising(count), plain, { ...FRAME, width, right: width - 14 }, write)
        const places = layout?.days.map(({ x }) => x) ?? []
        expect(places.length).toBeGreaterThan(0)
        for (const [index, x] of places.entries()) if (index > 0) expect(x - (places[index - 1] ?? 0)).toBeGreaterThanOrEqual(44)
      }
    }
  })

  it('writes thousands as k', () => {
    expect([0, 500, 25_000, 2_500].map(levelText)).toEqual(['0', '500', '25k', '2.5k'])
  })
})
