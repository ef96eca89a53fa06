import { defineStore } from 'pinia'
import { computed, ref, shallowRef } from 'vue'
import type { AquiferUnit, MapWellQuery } from '#shared/contracts/map.ts'
import type { ParameterId } from '#shared/words/parameters.ts'

export const layerNames = { wells: 'Wells', streams: 'Streams', units: 'Unit outlines', boundaries: 'Boundaries' }
export type LayerId = keyof typeof layerNames

/** What an entry of the legend leaves on the map. */
export type WellFilter =
  | { kind: 'only'; only: NonNullable<MapWellQuery['only']> }
  /** Class of the value ramp, counted from 0. */
  | { kind: 'class'; index: number }

export interface MapPosition {
  lat: number
  lon: number
  zoom: number
}

type Asked = Pick<MapWellQuery, 'quantity' | 'storageClass'>

/** Elastic storage and specific yield are one column of the regional table and two questions on the map. */
const asked: Record<ParameterId, Asked> = {
  T: { quantity: 'T' },
  S: { quantity: 'S', storageClass: 'elastic' },
  Sy: { quantity: 'S', storageClass: 'specific-yield' },
  K: { quantity: 'K' },
}

/** What the reader chose to see on the map, kept while the page is open: coming back to the map finds it as it was. */
export const useMapChoice = defineStore('map', () => {
  /** Null: no unit, every well is a hollow ring. Undefined until the units are known. */
  const unitId = ref<number | null | undefined>(undefined)
  const parameter = ref<ParameterId>('T')
  const layers = ref<Record<LayerId, boolean>>({ wells: true, streams: true, units: true, boundaries: true })
  const filter = ref<WellFilter | null>(null)
  const basemapId = ref<string | null>(null)
  const position = shallowRef<MapPosition | null>(null)
  const askedValues = computed(() => asked[parameter.value])

  /** Begins with the unit that is known best. */
  function settleUnit(units: readonly AquiferUnit[]) {
    if (unitId.value === null || units.some(({ id }) => id === unitId.value)) return
    const [best] = [...units].sort((a, b) => b.valueCounts.T - a.valueCounts.T)
    unitId.value = best?.id ?? null
  }

  /** Filters by an entry of the legend; the same entry again shows everything. */
  function toggleFilter(wanted: WellFilter) {
    filter.value = JSON.stringify(filter.value) === JSON.stringify(wanted) ? null : wanted
  }

  function chooseUnit(id: number | null) {
    unitId.value = id
    filter.value = null
  }

  function chooseParameter(id: ParameterId) {
    parameter.value = id
    filter.value = null
  }

  return {
    unitId,
    parameter,
    layers,
    filter,
    basemapId,
    position,
    askedValues,
    settleUnit,
    toggleFilter,
    chooseUnit,
    chooseParameter,
  }
})
