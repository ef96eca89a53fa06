import { shallowRef, type ShallowRef } from 'vue'

async function load() {
  const [crs, transform, slip] = await Promise.all([
    import('#shared/geodesy/crs.ts'),
    import('#shared/geodesy/transform.ts'),
    import('#shared/geodesy/slip.ts'),
  ])
  return { ...crs, ...transform, ...slip }
}

export type Geodesy = Awaited<ReturnType<typeof load>>

const loaded = shallowRef<Geodesy | null>(null)
let loading: Promise<void> | null = null

/**
 * Coordinate systems and their transforms; null until they are there. Their table is large, so it comes only when
 * somebody asks for coordinates in another system, once for the whole page.
 */
export function useGeodesy(): Readonly<ShallowRef<Geodesy | null>> {
  loading ??= load().then(
    (geodesy) => void (loaded.value = geodesy),
    // The next who asks tries again: the network may be back by then.
    () => void (loading = null),
  )
  return loaded
}
