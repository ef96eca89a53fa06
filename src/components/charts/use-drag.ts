import { onScopeDispose } from 'vue'

/** A pointer that drags one element; positions are given at most once a frame, in pixels of the window. */
export function useDrag(moved: (at: { x: number; y: number }) => void) {
  let frame = 0
  let last = { x: 0, y: 0 }
  let held: number | null = null

  function down(event: PointerEvent) {
    if (event.button !== 0 || !(event.currentTarget instanceof HTMLElement)) return
    held = event.pointerId
    event.currentTarget.setPointerCapture(event.pointerId)
    event.currentTarget.focus()
    event.preventDefault()
  }

  function move(event: PointerEvent) {
    if (event.pointerId !== held) return
    last = { x: event.clientX, y: event.clientY }
    frame ||= requestAnimationFrame(() => {
      frame = 0
      moved(last)
    })
  }

  function up(event: PointerEvent) {
    if (event.pointerId !== held) return
    held = null
    if (frame === 0) return
    cancelAnimationFrame(frame)
    frame = 0
    moved(last)
  }

  onScopeDispose(() => cancelAnimationFrame(frame))
  return { pointerdown: down, pointermove: move, pointerup: up, pointercancel: up }
}
