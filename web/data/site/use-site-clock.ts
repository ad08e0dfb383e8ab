import { useQuery } from '@tanstack/react-query'
import { siteQueries } from './queries.ts'

/**
 * The site's clock, which is the server's: epoch milliseconds for "happened now". It goes on by the device's own clock
 * from the last time the site was read, so that it also runs without a signal.
 */
export function useSiteClock(siteId: string): () => number {
  const { data, dataUpdatedAt } = useQuery(siteQueries.detail(siteId))
  return () => (data === undefined ? Date.now() : Date.parse(data.now) + Date.now() - dataUpdatedAt)
}

/** From a moment of this device's clock to the site's, epoch milliseconds. */
export function useSiteMoment(siteId: string): (moment: number) => number {
  const { data, dataUpdatedAt } = useQuery(siteQueries.detail(siteId))
  return (moment) => (data === undefined ? moment : moment + Date.parse(data.now) - dataUpdatedAt)
}
