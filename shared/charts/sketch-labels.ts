import type { Size } from './plot-frame.ts'

export interface SketchLabel {
  text: string
  x: number
  y: number
  anchor: 'start' | 'middle' | 'end'
}

interface Named {
  text: string
  x: number
  y: number
}

/** Height of a line of text, and how far it stands from its well, px. */
const LINE = 14
const GAP = 11
/** Below the middle of a symbol the baseline lies this far. */
const BASELINE = 4

/** Width of a letter of the labels on average, and how far labels stay inside the frame, px. */
const LETTER = 6
const INSET = 8
/** The scale bar has the lowest line to itself. */
const SCALE_LINE = 20
const before = { start: 0, middle: 0.5, end: 1 }

/** Moves a label into the frame, by the width that its letters have on average. */
export function insideFrame(label: SketchLabel, { width, height }: Size): SketchLabel {
  const long = label.text.length * LETTER
  const left = label.x - before[label.anchor] * long
  const moved = Math.max(INSET, Math.min(width - INSET - long, left)) - left
  return { ...label, x: label.x + moved, y: Math.max(LINE, Math.min(height - INSET - SCALE_LINE, label.y)) }
}

/** Labels beside points: to the right in the left part of the frame, else to the left; none over another of its side. */
export function besides(points: readonly Named[], { width, height }: Size): SketchLabel[] {
  const sides = points.map(({ x }) => (x < 0.55 * width ? ('start' as const) : ('end' as const)))
  const ys = points.map(({ y }) => y)
  for (const side of ['start', 'end'] as const)
    spread(
      ys,
      sides.flatMap((one, i) => (one === side ? [i] : [])),
      height,
    )
  return points.map(({ text, x }, i) => {
    const anchor = sides[i] as 'start' | 'end'
    return { text, x: anchor === 'start' ? x + GAP : x - GAP, y: (ys[i] as number) + BASELINE, anchor }
  })
}

/** Moves the heights of some labels apart, downwards first, and back up where they would leave the frame. */
function spread(ys: number[], indices: number[], height: number): void {
  const ordered = [...indices].sort((a, b) => (ys[a] as number) - (ys[b] as number))
  let last = -Infinity
  for (const i of ordered) last = ys[i] = Math.max(ys[i] as number, last + LINE)
  let next = height - LINE
  for (const i of ordered.reverse()) next = (ys[i] = Math.min(ys[i] as number, next)) - LINE
}
