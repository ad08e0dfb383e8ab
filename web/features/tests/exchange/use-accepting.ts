import { useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { inHappenedOrder } from '#shared/exchange/happened-order.ts'
import type { ImportRow, ImportTests, ImportTestsAnswer } from '#shared/schemas/test-exchange.ts'
import { afterImport, importTests } from '#web/data/test/import-mutations.ts'
import { uuidOf } from './row-ids.ts'

/** Tests recorded in one go: others who record wait meanwhile. */
const AT_ONCE = 50

export interface Accepted {
  readonly recorded: ImportTestsAnswer['recorded']
  readonly already: readonly number[]
}

interface Accepting {
  readonly siteId: string
  readonly file: ImportTests['file']
  readonly rows: readonly ImportRow[]
  readonly setAside: ImportTests['setAside']
}

/** Sends rows in batches that have ids by what they hold, so that one whose answer was lost is not recorded twice. */
export function useAccepting() {
  const client = useQueryClient()
  const [progress, setProgress] = useState<{ readonly done: number; readonly total: number } | null>(null)
  const [error, setError] = useState<Error | null>(null)
  const [accepted, setAccepted] = useState<Accepted | null>(null)

  const accept = async ({ siteId, file, rows, setAside }: Accepting): Promise<boolean> => {
    const ordered = inHappenedOrder(rows)
    let result: Accepted = accepted ?? { recorded: [], already: [] }
    setError(null)
    setProgress({ done: 0, total: ordered.length })
    try {
      for (let from = 0; from < ordered.length; from += AT_ONCE) {
        const part = { file, rows: ordered.slice(from, from + AT_ONCE), setAside: from === 0 ? [...setAside] : [] }
        const answer = await importTests(siteId, { id: await uuidOf(JSON.stringify(['batch', siteId, part])), ...part })
        afterImport(client, siteId, answer)
        result = { recorded: [...result.recorded, ...answer.recorded], already: [...result.already, ...answer.already] }
        setProgress({ done: Math.min(from + AT_ONCE, ordered.length), total: ordered.length })
      }
      setAccepted(result)
      return true
    } catch (reason) {
      if (result.recorded.length > 0) setAccepted(result)
      setError(reason instanceof Error ? reason : new Error('The tests could not be recorded.'))
      return false
    } finally {
      setProgress(null)
    }
  }
  return { accept, progress, error, accepted }
}
