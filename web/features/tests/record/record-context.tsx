import { createContext, useContext } from 'react'
import type { Curve } from '#shared/schemas/lab.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import type { Assessment } from './assess-test.ts'

export interface RecordState {
  readonly assessment: Assessment
  readonly stakes: readonly Stake[]
  readonly curves: readonly Curve[]
  /** saving was tried: what is missing is said as well */
  readonly attempted: boolean
  /** what keeps this field from being saved, once it is time to say so */
  readonly problemAt: (field: string) => string | undefined
  /** what is unlikely about it: may be saved, flagged */
  readonly flagAt: (field: string) => string | undefined
}

const RecordContext = createContext<RecordState | null>(null)

export const RecordProvider = RecordContext

/**
 * The sheet being filled in.
 * @throws Error outside it
 */
export function useRecord(): RecordState {
  const state = useContext(RecordContext)
  if (state === null) throw new Error('useRecord() is for the parts of the recording sheet')
  return state
}
