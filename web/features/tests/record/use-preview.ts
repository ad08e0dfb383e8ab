import { useQuery } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import type { CreateTest, PreviewTest, TestPreview } from '#shared/schemas/field-test.ts'
import { testQueries } from '#web/data/test/queries.ts'
import { isApiError } from '#web/lib/api-error.ts'
import type { Assessment } from './assess-test.ts'
import type { TestForm } from './test-form.ts'

const WAIT_MS = 400

/** Refused by the reduction: asks for what a pass would do while the readings cannot be computed yet. */
const NOTHING_READ: PreviewTest['sheet'] = { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: 0, moisture: { method: 'stated', percent: 0 } }

export type Previewed = { readonly state: 'none' | 'asking' | 'offline' | 'failed' } | { readonly state: 'known'; readonly preview: TestPreview }

function inputOf(form: TestForm, { place, lift, sampledAt, curve, reduced, sheet, oversizePercent, problems }: Assessment, follows: CreateTest['follows']): PreviewTest | null {
  if (form.purpose === '' || !place || lift === null || sampledAt === null || !curve?.pair || problems.has('oversize')) return null
  return { purpose: form.purpose, follows, at: place.at, lift, sampledAt, curveId: curve.id, oversizePercent, sheet: reduced === null ? NOTHING_READ : sheet }
}

/** What saving would do to the ground, asked for once typing pauses. */
export function usePreview(siteId: string, form: TestForm, assessment: Assessment, follows: CreateTest['follows']): Previewed {
  const input = inputOf(form, assessment, follows)
  const text = input === null ? null : JSON.stringify(input)
  const [settled, setSettled] = useState(text)
  useEffect(() => {
    const timer = setTimeout(() => setSettled(text), WAIT_MS)
    return () => clearTimeout(timer)
  }, [text])
  const asked = settled === text ? input : null
  const { data, error, isPlaceholderData, fetchStatus } = useQuery(testQueries.preview(siteId, asked))
  if (input === null) return { state: 'none' }
  if (fetchStatus === 'paused' || (error !== null && isApiError(error) && error.code === 'unreachable')) return { state: 'offline' }
  if (asked === null) return { state: 'asking' }
  if (error !== null) return { state: 'failed' }
  return data === undefined || isPlaceholderData ? { state: 'asking' } : { state: 'known', preview: data }
}
