import { waterToAdd } from '#shared/domain/water.ts'
import type { Verdict } from '#shared/domain/verdict-types.ts'
import type { Purpose, TestPreview } from '#shared/schemas/field-test.ts'
import { cellsWords } from '#web/features/tests/cells-words.ts'
import { countOf } from '#web/features/tests/outcome-words.ts'
import type { SiteContextValue } from '#web/lib/site-context.tsx'

type Context = Pick<SiteContextValue, 'lookup' | 'units'>

const verb = (n: number, one: string, many: string): string => (n === 1 ? one : many)

/** What saving does to the ground, and what its gauge keeps it from, a sentence each. */
export function consequences(...asked: Parameters<typeof groundWords>): string[] {
  const [{ gauge }, { purpose }] = asked
  const words = groundWords(...asked)
  if (gauge === null || gauge.state === 'good') return words
  return [...words, purpose === 'required' && gauge.state !== 'not-named' ? `${gauge.message} Until that is put right it releases no ground.` : gauge.message]
}

function groundWords(preview: TestPreview, { outcome, purpose, lift }: { readonly outcome: Verdict['outcome'] | null; readonly purpose: Purpose; readonly lift: number }, { lookup }: Context): string[] {
  const words = preview.marks.map(({ kind, cells }) => {
    const what = cellsWords(cells, lookup)
    const n = cells.length
    switch (kind) {
      case 'fail':
        return `${what} ${verb(n, 'goes', 'go')} to rework when this is saved.`
      case 'suspect':
        return `In doubt: ${what.toLowerCase().startsWith('cell') ? what.replace(/^C/, 'c') : what} ${verb(n, 'stays', 'stay')} suspect until the test is run again here.`
      case 'hold':
        return `${what} ${verb(n, 'is', 'are')} put on hold until a retest or a referee decides.`
    }
  })
  if (words.length > 0) return words
  if (preview.lotName === null && preview.cell !== null) return [`No fill is recorded here at lift ${lift} yet. The test is kept and waits for it.`]
  if (purpose === 'judgement') return ['A judgement test that passes does not count toward the minimum; no cell changes.']
  if (purpose !== 'required') return ['Stands beside the contractor’s results; no cell changes.']
  const would = outcome === null
  if (preview.meets.length > 0) {
    const n = preview.meets.length
    const cells = cellsWords(preview.meets, lookup)
    return [would ? `If it passes, ${cells.replace(/^C/, 'c')} ${verb(n, 'meets', 'meet')} spec.` : `Speaks for ${countOf(n, 'cell')}: ${cells.replace(/^Cells? /, '')} then ${verb(n, 'meets', 'meet')} spec.`]
  }
  return would ? [] : [`Counts for ${preview.lotName ?? 'its lot'}; no cell changes by it alone.`]
}

const ON_WATER: readonly string[] = ['too-dry', 'too-wet', 'saturation-low', 'saturation-high']

/** Water that brings the marked cells to optimum; null where water is not the trouble. */
export function waterWords(verdict: Verdict, preview: TestPreview | undefined, { units }: Context): string | null {
  const marked = preview?.marks.find((mark) => mark.kind === 'fail')
  if (!marked || !verdict.reasons.some((reason) => ON_WATER.includes(reason.code))) return null
  const { litres } = waterToAdd({ volumeCm3: marked.volumeCm3, dryDensityKgM3: verdict.test.dryDensity, moisturePercent: verdict.test.moisture, targetPercent: verdict.optimumUsed })
  const ground = `${countOf(marked.cells.length, 'cell')} (${units.volume(marked.volumeCm3)})`
  return litres >= 0 ? `To bring ${ground} to optimum, add about ${units.water(litres)}.` : `To bring ${ground} to optimum, dry off about ${units.water(-litres)} of water.`
}
