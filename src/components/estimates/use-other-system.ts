import { computed, shallowRef, watch, type Ref } from 'vue'
import { CrsError } from '#shared/geodesy/crs-error.ts'
import { formatLonLat, formatPlanar } from '#shared/geodesy/format-position.ts'
import type { LonLat } from '#shared/geodesy/types.ts'
import { errorText } from '#shared/words/errors/index.ts'

type Written = { name: string; text: string } | { problem: string }

async function written(epsg: number, { lon, lat }: LonLat): Promise<Written> {
  const [{ fromWgs84 }, { requireCrs }] = await Promise.all([
    import('#shared/geodesy/transform.ts'),
    import('#shared/geodesy/crs.ts'),
  ])
  try {
    const { name, axis, metresPerUnit } = requireCrs(epsg)
    const point = fromWgs84(epsg, lon, lat)
    const text = metresPerUnit === null ? formatLonLat({ lon: point.x, lat: point.y }, 6) : formatPlanar(point, axis)
    return { name, text }
  } catch (error) {
    if (error instanceof CrsError) return { problem: errorText(error.code, error.params) }
    throw error
  }
}

/** A place in whatever offered system the reader types the EPSG code of; null while nothing is typed. */
export function useOtherSystem(code: Ref<string>, place: LonLat) {
  const answer = shallowRef<Written | null>(null)
  const epsg = computed(() => /^\s*(?:EPSG\s*:?)?\s*(\d{3,6})\s*$/i.exec(code.value)?.[1] ?? null)

  watch(epsg, async (asked) => {
    const found = asked === null ? null : await written(Number(asked), place)
    // A slower answer for what was typed before is no answer any more.
    if (asked === epsg.value) answer.value = found
  })
  return answer
}
