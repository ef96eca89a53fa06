import { computed, onScopeDispose, watch, type Ref } from 'vue'
import { useTheme } from 'vuetify'
import { destination } from '#shared/geodesy/geodesic.ts'
import type { LonLat } from '#shared/geodesy/types.ts'
import { useMap } from '../../composables/useMap.ts'
import { CanvasLayer } from '../map/canvas-layer.ts'
import { mapColours, type MapColours } from '../map/map-colours.ts'
import type { MapFrame } from '../map/map-frame.ts'

interface Drawn {
  /** Points of the circle, in order. */
  circle: readonly LonLat[]
  place: LonLat
  lit: LonLat | null
}

const CORNERS = 96

const circleAround = (place: LonLat, radiusM: number): LonLat[] =>
  Array.from({ length: CORNERS }, (_, i) => destination(place, (360 * i) / CORNERS, radiusM))

function paint(context: CanvasRenderingContext2D, frame: MapFrame, { circle, place, lit }: Drawn, colours: MapColours) {
  context.beginPath()
  for (const { lon, lat } of circle) context.lineTo(...frame.project(lon, lat))
  context.closePath()
  context.strokeStyle = colours.ochre
  context.lineWidth = 1.2
  context.setLineDash([5, 4])
  context.stroke()
  context.setLineDash([])
  if (!lit) return
  const [x, y] = frame.project(lit.lon, lit.lat)
  context.beginPath()
  context.moveTo(...frame.project(place.lon, place.lat))
  context.lineTo(x, y)
  context.moveTo(x + 13, y)
  context.arc(x, y, 13, 0, 2 * Math.PI)
  context.lineWidth = 2.5
  context.stroke()
}

/** The radius around the place, and a ring around the value or test that is pointed at in the sheet. */
export function useEstimateLayer(place: LonLat, radiusM: Ref<number>, lit: Ref<LonLat | null>) {
  const { map } = useMap()
  const theme = useTheme()
  const colours = computed(() => mapColours(theme.current.value.dark ? 'dark' : 'light'))
  const circle = computed(() => circleAround(place, radiusM.value))

  const layer = new CanvasLayer('estimate', 415, (context, frame) =>
    paint(context, frame, { circle: circle.value, place, lit: lit.value }, colours.value),
  )
  watch(map, (now) => now && layer.addTo(now), { immediate: true })
  watch([circle, lit, colours], () => layer.redraw())
  onScopeDispose(() => layer.remove())
}
