import type { Map as LeafletMap } from 'leaflet'
import { computed, onScopeDispose, watch, watchEffect, type Ref, type ShallowRef } from 'vue'
import { useTheme } from 'vuetify'
import type { ValueClasses } from '#shared/charts/value-classes.ts'
import type { MapCluster, MapWell } from '#shared/contracts/map.ts'
import type { MapMarks } from '../../composables/useMap.ts'
import { useMapChoice } from '../../stores/map.ts'
import { CanvasLayer } from './canvas-layer.ts'
import { mapColours } from './map-colours.ts'
import { paintBoundaries } from './paint-boundaries.ts'
import { paintStreams, paintUnits } from './paint-lines.ts'
import { paintContributions, paintPlace } from './paint-marks.ts'
import { paintUnitNames } from './paint-unit-names.ts'
import { paintLit, paintWells, type Lit } from './paint-wells.ts'
import type { MapGround } from './use-map-ground.ts'

interface Drawn {
  map: ShallowRef<LeafletMap | null>
  ground: Pick<MapGround, 'streams' | 'units' | 'boundaries'>
  wells: Readonly<Ref<readonly MapWell[]>>
  clusters: Readonly<Ref<readonly MapCluster[]>>
  classes: Readonly<Ref<ValueClasses>>
  marks: ShallowRef<MapMarks | null>
  lit: Readonly<Ref<readonly Lit[]>>
  litStream: Readonly<Ref<number | null>>
}

/** The canvases over the base map, each drawn anew when something on it changes. */
export function useMapLayers({ map, ground, wells, clusters, classes, marks, lit, litStream }: Drawn) {
  const choice = useMapChoice()
  const theme = useTheme()
  const colours = computed(() => mapColours(theme.current.value.dark ? 'dark' : 'light'))
  const chosenUnit = computed(() => choice.unitId ?? null)

  const groundLayer = new CanvasLayer('ground', 410, (context, frame) => {
    const { streams, units, boundaries } = choice.layers
    if (units) paintUnits(context, frame, ground.units.value, colours.value, chosenUnit.value)
    if (streams) paintStreams(context, frame, ground.streams.value, colours.value, litStream.value)
    if (boundaries) paintBoundaries(context, frame, ground.boundaries.value, colours.value)
    if (units) paintUnitNames(context, frame, ground.units.value, colours.value, chosenUnit.value)
    if (marks.value) paintContributions(context, frame, marks.value, colours.value)
  })
  const wellLayer = new CanvasLayer('wells', 420, (context, frame) => {
    const drawn = { wells: wells.value, clusters: clusters.value, classes: classes.value }
    if (choice.layers.wells) paintWells(context, frame, drawn, colours.value)
    paintLit(context, frame, lit.value, colours.value)
    if (marks.value?.place) paintPlace(context, frame, marks.value.place, colours.value)
  })
  const layers = [groundLayer, wellLayer]

  watch(map, (now) => now && layers.forEach((layer) => layer.addTo(now)), { immediate: true })
  watch(
    [
      ground.streams,
      ground.units,
      ground.boundaries,
      colours,
      chosenUnit,
      marks,
      litStream,
      () => ({ ...choice.layers }),
    ],
    () => groundLayer.redraw(),
  )
  watch([wells, clusters, classes, colours, marks, lit, () => choice.layers.wells], () => wellLayer.redraw())
  // Letters are drawn with the fallback font until the page's own is there.
  watchEffect(() => void document.fonts?.ready.then(() => layers.forEach((layer) => layer.redraw())))
  onScopeDispose(() => layers.forEach((layer) => layer.remove()))
}
