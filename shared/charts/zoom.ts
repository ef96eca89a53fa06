import { valueAt, type Axis } from './axis.ts'

/** The part of an axis that is looked at, as shares of it. */
export type View = readonly [from: number, to: number]

export const WHOLE: View = [0, 1]

/** No reading is apart from its neighbours at less of the axis. */
const NARROWEST = 1e-4

/** Keeps a view on the axis. */
function onAxis(from: number, width: number): View {
  const start = Math.min(Math.max(from, 0), 1 - width)
  return [start, start + width]
}

/** A view `factor` times as wide; what lies at the share `at` of it stays where it is. */
export function scaled([from, to]: View, factor: number, at = 0.5): View {
  const width = Math.min(Math.max((to - from) * factor, NARROWEST), 1)
  return width === 1 ? WHOLE : onAxis(from + at * (to - from - width), width)
}

/** A view moved by a share of its own width. */
export const shifted = ([from, to]: View, share: number): View => onAxis(from + share * (to - from), to - from)

export const isWhole = ([from, to]: View) => from === 0 && to === 1

/** Its ends in the unit of the axis. */
export const endsOf = (axis: Axis, view: View): [number, number] => [valueAt(axis, view[0]), valueAt(axis, view[1])]
