import { computed, ref, shallowRef, watch, type Ref } from 'vue'
import { shareOf, type Axis } from '#shared/charts/axis.ts'
import { plotFrame, xValue } from '#shared/charts/plot-frame.ts'
import { endsOf, isWhole, scaled, shifted, WHOLE, type View } from '#shared/charts/zoom.ts'

/** One step, and one notch of a wheel. */
const CLOSER = 0.5
const NOTCH = 0.8
/** Of what is seen, so that some of it stays in sight. */
const ASIDE = 0.5

/** The part of the abscissa that is looked at; another subject, such as another kind of plot, is seen whole at first. */
export function useZoom(subject: Ref<unknown>) {
  const view = shallowRef<View>(WHOLE)
  /** The axis that the view is a part of, as it was when it was last seen whole. */
  const whole = ref<Axis | null>(null)
  const ends = computed(() => (whole.value && !isWhole(view.value) ? endsOf(whole.value, view.value) : null))

  function look(axis: Axis, next: (view: View) => View) {
    if (isWhole(view.value)) whole.value = axis
    view.value = next(view.value)
  }
  const reset = () => (view.value = WHOLE)
  watch(subject, reset, { flush: 'sync' })

  /** By a wheel with Ctrl, or two fingers on a touch pad, about the place under the pointer. */
  function wheel(event: WheelEvent, axis: Axis, withStrip: boolean) {
    if (!(event.currentTarget instanceof HTMLElement)) return
    const { left, width, height } = event.currentTarget.getBoundingClientRect()
    const at = shareOf(axis, xValue(plotFrame({ width, height }, { withStrip }), axis, event.clientX - left))
    look(axis, (seen) => scaled(seen, event.deltaY < 0 ? NOTCH : 1 / NOTCH, Math.min(Math.max(at, 0), 1)))
  }

  return {
    ends,
    canMove: computed(() => ends.value !== null),
    closer: (axis: Axis) => look(axis, (seen) => scaled(seen, CLOSER)),
    farther: (axis: Axis) => look(axis, (seen) => scaled(seen, 1 / CLOSER)),
    left: (axis: Axis) => look(axis, (seen) => shifted(seen, -ASIDE)),
    right: (axis: Axis) => look(axis, (seen) => shifted(seen, ASIDE)),
    reset,
    wheel,
  }
}

export type Zoom = ReturnType<typeof useZoom>
