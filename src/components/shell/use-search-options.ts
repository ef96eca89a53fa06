import { useQuery } from '@pinia/colada'
import { computed, ref, shallowRef, watch, type Ref } from 'vue'
import { useRouter } from 'vue-router'
import type { SearchHit } from '#shared/contracts/map.ts'
import { fetchSearchHits } from '../../api/search.ts'
import { useDebounced } from '../../composables/useDebounced.ts'
import { toAquiferUnit, toPlace, toPumpingTest, toStream, toWell, type Link } from '../../router/links.ts'
import { useMapChoice } from '../../stores/map.ts'
import { useSession } from '../../stores/session.ts'
import type { PlaceReading } from './read-place.ts'

export type SearchKind = SearchHit['kind'] | 'place'

export interface SearchOption {
  id: string
  kind: SearchKind
  title: string
  facts: string
  to: Link
}

const links: Record<SearchHit['kind'], (id: number) => Link> = {
  well: toWell,
  'aquifer-unit': toAquiferUnit,
  stream: toStream,
  'pumping-test': toPumpingTest,
}

/** Only what can be coordinates makes the browser fetch the table of coordinate systems. */
const mayBePlace = (text: string) => /\d[\d.,°'′″"\s]*[\s,;:]+[-+−NSEWnsew\d]/.test(text) || /^\s*epsg/i.test(text)

/** What was typed as a place, while it is the text that is typed now. */
function usePlace(text: Readonly<Ref<string>>) {
  const session = useSession()
  const reading = shallowRef<PlaceReading>({ places: [], problem: null })
  watch(text, async (typed) => {
    reading.value = { places: [], problem: null }
    if (!mayBePlace(typed)) return
    const { readPlace } = await import('./read-place.ts')
    if (text.value === typed) reading.value = readPlace(typed, session.region?.extent)
  })
  return reading
}

/** What the search box offers for a text: the place that it names, then wells, units, streams and tests. */
export function useSearchOptions(text: Ref<string>) {
  const router = useRouter()
  const choice = useMapChoice()
  const trimmed = computed(() => text.value.trim())
  const settled = useDebounced(ref(trimmed), 180)
  const place = usePlace(settled)

  const { data, isLoading, error } = useQuery({
    key: () => ['search', settled.value],
    query: ({ signal }) => fetchSearchHits(settled.value.slice(0, 100), signal),
    enabled: () => settled.value !== '',
  })

  const options = computed<SearchOption[]>(() => {
    if (trimmed.value === '') return []
    const places = place.value.places.map(({ title, facts, lon, lat }, index) => ({
      id: `place-${index}`,
      kind: 'place' as const,
      title,
      facts,
      to: toPlace({ lon, lat }, choice.unitId ?? null),
    }))
    const hits = (data.value?.items ?? [])
      .map(({ kind, id, title, facts }) => ({ id: `${kind}-${id}`, kind, title, facts, to: links[kind](id) }))
      .filter(({ kind }) => kind !== 'pumping-test' || router.hasRoute('pumping-test'))
    return [...places, ...hits]
  })

  /** In words, when there is nothing to choose from. */
  const message = computed(() => {
    if (place.value.problem) return place.value.problem
    if (error.value) return error.value.message
    const busy = isLoading.value || settled.value !== trimmed.value
    return options.value.length > 0 || busy ? '' : `Nothing is called “${trimmed.value}”, and it is not a place.`
  })

  return { options, message, settled: computed(() => settled.value === trimmed.value && !isLoading.value) }
}
