import { useQuery } from '@pinia/colada'
import { computed, shallowRef, watch, type ShallowRef } from 'vue'
import type { MapWellQuery, MapWells } from '#shared/contracts/map.ts'
import { valueClasses, type ValueClasses } from '#shared/charts/value-classes.ts'
import { parameters, type ParameterId } from '#shared/words/parameters.ts'
import { fetchMapWells } from '../../api/map.ts'
import { useDebounced } from '../../composables/useDebounced.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { useMapChoice, type WellFilter } from '../../stores/map.ts'
import { fetchBox } from './fetch-box.ts'
import type { MapWindow } from './use-map-window.ts'

const PAUSE_MS = 120
/** Answers of views left behind are worth keeping only for a step back. */
const KEPT_MS = 30_000

interface Answer {
  wells: MapWells
  parameter: ParameterId
}

type Filtered = Pick<MapWellQuery, 'only' | 'from' | 'below'>

function filterQuery(filter: WellFilter | null, { classes }: ValueClasses): Filtered {
  if (filter === null) return {}
  if (filter.kind === 'only') return { only: filter.only }
  const chosen = classes[filter.index]
  return { only: 'valued', from: chosen?.from ?? undefined, below: chosen?.to ?? undefined }
}

/** The wells of the window in the chosen unit and parameter. While new ones are on their way the last ones stay. */
export function useMapWells(shown: ShallowRef<MapWindow | null>) {
  const choice = useMapChoice()
  const units = useUnits()
  const classesOf = (id: ParameterId) => valueClasses(id, units.id(parameters[id].dimension))
  const classes = computed(() => classesOf(choice.parameter))

  const query = computed<MapWellQuery | null>(() => {
    if (!shown.value || choice.unitId === undefined) return null
    const { box, zoom } = shown.value
    return {
      bbox: fetchBox(box, zoom),
      zoom,
      unitId: choice.unitId ?? undefined,
      ...choice.askedValues,
      ...filterQuery(choice.filter, classes.value),
    }
  })
  const asked = computed(() => (query.value ? JSON.stringify({ query: query.value, parameter: choice.parameter }) : ''))
  const settled = useDebounced(asked, PAUSE_MS)

  let running: AbortController | null = null
  async function fetchLatest(signal: AbortSignal): Promise<Answer> {
    // Only what the window shows now is worth waiting for.
    running?.abort()
    const own = (running = new AbortController())
    signal.addEventListener('abort', () => own.abort(), { once: true })
    const { query: wanted, parameter } = JSON.parse(settled.value) as { query: MapWellQuery; parameter: ParameterId }
    return { wells: await fetchMapWells(wanted, own.signal), parameter }
  }

  const { data, error, isLoading, refetch } = useQuery({
    key: () => ['map', 'wells', settled.value],
    query: ({ signal }) => fetchLatest(signal),
    enabled: () => settled.value !== '',
    gcTime: KEPT_MS,
  })
  const latest = shallowRef<Answer | null>(null)
  watch(data, (answer) => answer && (latest.value = answer), { immediate: true })

  const wells = computed(() => latest.value?.wells ?? null)
  /** Of the wells that are drawn, which may be those of the choice before. */
  const drawnClasses = computed(() => classesOf(latest.value?.parameter ?? choice.parameter))
  return { wells, drawnClasses, error, isLoading, refetch }
}
