import { computed } from 'vue'
import { useRoute, useRouter, type LocationQueryValue } from 'vue-router'
import { estimateQuery, nearbyQuery, type EstimateQuery } from '#shared/contracts/estimates.ts'
import { useMapChoice } from '../../stores/map.ts'

type Text = LocationQueryValue | LocationQueryValue[] | undefined

const { unitId: unitField, quantity: quantityField, depthM: depthField } = estimateQuery.shape
const { radiusM: radiusField } = nearbyQuery.shape

/** What an address holds, or nothing where it is no such thing: an address may come from anywhere. */
const read = <Value>(
  field: { safeParse: (text: unknown) => { success: boolean; data?: Value } },
  text: Text,
): Value | undefined => (typeof text === 'string' ? field.safeParse(text).data : undefined)

/** `-38.4172,-21.1840`: latitude first, as coordinates are typed. Null for anything else. */
export function placeOf(text: unknown): { lat: number; lon: number } | null {
  const found = /^(-?\d+(?:\.\d+)?),(-?\d+(?:\.\d+)?)$/.exec(String(text))
  const [lat, lon] = [Number(found?.[1]), Number(found?.[2])]
  return Math.abs(lat) <= 90 && Math.abs(lon) <= 180 ? { lat, lon } : null
}

/** Centimetres are enough in an address, which lengths typed in feet would fill with digits. */
const short = (metres: number) => String(Number(metres.toFixed(2)))

export type PlaceChange = Partial<Record<'unit' | 'quantity' | 'depth' | 'radius', string | number | null>>

/** What is asked about a place. It stands in the address, so that a link and Back ask the same again. */
export function usePlaceQuestion() {
  const route = useRoute()
  const router = useRouter()
  const map = useMapChoice()

  const place = placeOf(route.params.place)
  const question = computed<EstimateQuery | null>(() => {
    const { unit, quantity, depth } = route.query
    const unitId = read(unitField, unit)
    return (
      place && {
        ...place,
        unitId,
        quantity: read(quantityField, quantity) ?? map.parameter,
        depthM: read(depthField, depth),
      }
    )
  })
  const radiusM = computed(() => read(radiusField, route.query.radius) ?? radiusField.parse(undefined))

  /** Keeps the rest of the address. */
  const change = (changes: PlaceChange) => {
    const query = Object.fromEntries(
      Object.entries({ ...route.query, ...changes })
        .filter(([, value]) => value !== null && value !== undefined)
        .map(([name, value]) => [name, typeof value === 'number' ? short(value) : value]),
    )
    return router.replace({ params: route.params, query })
  }

  return { place, question, radiusM, change }
}
