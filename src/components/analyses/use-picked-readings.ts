import { computed, ref, shallowRef, watch, type Ref } from 'vue'
import { placedReadings, type PlacedReading } from '#shared/charts/placed-readings.ts'
import type { TestPlot } from '#shared/charts/test-chart.ts'
import type { ReadingDecision } from '#shared/contracts/reading-series.ts'
import { decideReadings } from '../../api/reading-series.ts'
import { useDataChanged } from '../../composables/useDataChanged.ts'
import { useSubmit } from '../../composables/useSubmit.ts'
import { useWorkbench } from './use-workbench.ts'

/** As many readings of one log are decided at once. */
export const MOST_DECIDED = 20_000

export const readingKey = ({ wellId, index }: Pick<PlacedReading, 'wellId' | 'index'>) => `${wellId}:${index}`

type Word = Pick<ReadingDecision, 'action' | 'reason'>

/** Readings chosen on the plot, and the analyst's word about them. What the logger wrote stays as it is. */
export function usePickedReadings(plot: Ref<TestPlot>) {
  const { test, snapshot } = useWorkbench()
  const dataChanged = useDataChanged()
  const picking = ref(false)
  const keys = shallowRef<ReadonlySet<string>>(new Set())

  const mayPick = computed(() => test.value.mayEdit && 'clock' in plot.value && snapshot.value.readings.length > 0)
  const readings = computed(() =>
    picking.value && 'clock' in plot.value ? placedReadings(plot.value, snapshot.value.inputs) : [],
  )
  const chosen = computed(() => readings.value.filter((reading) => keys.value.has(readingKey(reading))))
  watch([() => snapshot.value.inputs, picking], () => choose([]))
  watch(mayPick, (may) => (picking.value &&= may))

  function choose(wanted: readonly PlacedReading[]) {
    keys.value = new Set(wanted.map(readingKey))
  }

  const add = (more: readonly PlacedReading[]) => choose([...chosen.value, ...more])

  function toggle(reading: PlacedReading) {
    const others = chosen.value.filter((other) => readingKey(other) !== readingKey(reading))
    choose(others.length < chosen.value.length ? others : [...others, reading])
  }

  /** Every well has its own log. */
  function bodies({ action, reason }: Word) {
    return snapshot.value.readings.flatMap(({ wellId, seriesId, seq }) => {
      const seqs = chosen.value
        .filter((reading) => reading.wellId === wellId && reading.included === (action === 'leave-out'))
        .map(({ index }) => seq[index] as number)
      return seqs.length > 0 ? [{ seriesId, body: { seqs, action, reason } }] : []
    })
  }

  const { submit, sending, problem, clear } = useSubmit(async (word: Word, idempotencyKey: string) => {
    for (const { seriesId, body } of bodies(word)) await decideReadings(seriesId, body, `${idempotencyKey}-${seriesId}`)
    return true
  })

  async function decide(word: Word): Promise<boolean> {
    const done = await submit(word)
    // What was decided before something failed is shown too.
    await dataChanged()
    return done !== null
  }

  return { mayPick, picking, readings, chosen, choose, add, toggle, decide, sending, problem, clear }
}

export type PickedReadings = ReturnType<typeof usePickedReadings>
