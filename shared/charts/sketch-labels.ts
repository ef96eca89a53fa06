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

export interface Box {
  left: number
  right: number
  top: number
  bottom: number
}

/** Height of a line of text, and how far it stands from its well, px. */
const LINE = 14
const GAP = 11
/** Below the middle of a symbol the baseline lies this far. */
const BASELINE = 4
/** Half the size of the symbol of a well. */
const SYMBOL = 8

/** Width of a letter of the labels on average, and how far labels stay inside the frame, px. */
const LETTER = 6
const INSET = 8
/** The scale bar has the lowest line to itself, and the arrow to the north its corner. */
const SCALE_LINE = 20
const ARROW = { width: 28, height: 42 }
const before = { start: 0, middle: 0.5, end: 1 }

const widthOf = ({ text }: Pick<SketchLabel, 'text'>) => text.length * LETTER

/** Where a label lies, by the width that its letters have on average. */
export function boxOf(label: SketchLabel): Box {
  const left = label.x - before[label.anchor] * widthOf(label)
  const middle = label.y - BASELINE
  return { left, right: left + widthOf(label), top: middle - LINE / 2, bottom: middle + LINE / 2 }
}

/** Moves a label into the frame. */
function insideFrame(label: SketchLabel, { width, height }: Size): SketchLabel {
  const { left } = boxOf(label)
  const moved = Math.max(INSET, Math.min(width - INSET - widthOf(label), left)) - left
  return { ...label, x: label.x + moved, y: Math.max(LINE, Math.min(height - INSET - SCALE_LINE, label.y)) }
}

/** Places of a label around a point, the best first: beside it where there is more room, above and below, a line off. */
export function around({ text, x, y }: Named, { width }: Size): SketchLabel[] {
  const right: SketchLabel = { text, x: x + GAP, y: y + BASELINE, anchor: 'start' }
  const left: SketchLabel = { text, x: x - GAP, y: y + BASELINE, anchor: 'end' }
  const sides = x < 0.55 * width ? [right, left] : [left, right]
  const middle: SketchLabel = { text, x, y: y + BASELINE, anchor: 'middle' }
  const lower = (label: SketchLabel, lines: number) => ({ ...label, y: label.y + lines * LINE })
  return [
    ...sides,
    lower(middle, -1.2),
    lower(middle, 1.2),
    ...[1, -1, 2, -2, 3, -3, 4, -4].flatMap((lines) => sides.map((label) => lower(label, lines))),
  ]
}

export const symbolBox = ({ x, y }: { x: number; y: number }): Box => ({
  left: x - SYMBOL,
  right: x + SYMBOL,
  top: y - SYMBOL,
  bottom: y + SYMBOL,
})

const overlap = (one: Box, other: Box) =>
  Math.max(0, Math.min(one.right, other.right) - Math.max(one.left, other.left)) *
  Math.max(0, Math.min(one.bottom, other.bottom) - Math.max(one.top, other.top))

/** Takes for each label, one after the other, the first of its places where it covers nothing, or else the least. */
export function placeLabels(
  requests: readonly (readonly SketchLabel[])[],
  symbols: readonly Box[],
  size: Size,
): SketchLabel[] {
  const arrow = { left: size.width - ARROW.width, right: size.width, top: 0, bottom: ARROW.height }
  const taken = [arrow, ...symbols]
  return requests.map((places) => {
    const tried = places
      .map((place) => insideFrame(place, size))
      .map((label) => ({ label, covered: taken.reduce((sum, box) => sum + overlap(boxOf(label), box), 0) }))
    const least = Math.min(...tried.map(({ covered }) => covered))
    const { label } = tried.find(({ covered }) => covered === least) as (typeof tried)[number]
    taken.push(boxOf(label))
    return label
  })
}
