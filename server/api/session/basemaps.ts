import type { Basemap } from '#shared/contracts/basemap.ts'
import type { Deps } from '../../deps.ts'
import { basemapInfo, openBasemaps } from '../../tiles/basemap.ts'

/** The maps that a page may show, the one to begin with first; an unusable archive leaves the bundled map. */
export function basemapsOf({ config: { basemap }, log }: Pick<Deps, 'config' | 'log'>): () => Promise<Basemap[]> {
  async function load(): Promise<Basemap[]> {
    try {
      return await basemapInfo(await openBasemaps(basemap), basemap?.attribution)
    } catch (error) {
      if (!basemap) throw error
      log.error({ err: error }, 'the configured basemap cannot be used')
      return basemapInfo(await openBasemaps(null))
    }
  }
  let loaded: Promise<Basemap[]> | undefined
  return () => (loaded ??= load())
}
