import { useQueryCache } from '@pinia/colada'

/**
 * Everything that follows from wells, tests, analyses and adopted values. One list for every write: a test that is moved
 * or a value that is accepted shows in lists, on the map and in estimates alike, and what is not on the page costs nothing.
 */
const followers = [
  'adopted-values',
  'aquifer-units',
  'estimates',
  'map',
  'pumping-tests',
  'reading-rows',
  'reviews',
  'search',
  'wells',
] as const

/**
 * Tells the page that data of the region have changed. Resolves once what is shown has been fetched anew; what could not
 * be fetched says so where it stands, and is no failure of the write that came before.
 */
export function useDataChanged(): () => Promise<void> {
  const queries = useQueryCache()
  return async () => {
    await Promise.allSettled(followers.map((resource) => queries.invalidateQueries({ key: [resource] })))
  }
}
