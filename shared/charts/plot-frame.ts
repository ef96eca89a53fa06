import { shareOf, valueAt, type Axis } from './axis.ts'

/** Room around a plot, px. The page lays its handles over the same frame that the chart is drawn in. */
export interface Margins {
  left: number
  right: number
  top: number
  bottom: number
}

export interface Size {
  width: number
  height: number
}

/** A plot with its axes, and a strip of residuals under it where there is one. */
export interface PlotFrame {
  size: Size
  plot: Margins
  strip: Margins | null
}

/** On the left, tick labels and the title of the axis; a narrow window needs as much. */
const SIDE = { left: 66, right: 18 }
const STRIP_HEIGHT = 62
const STRIP_BOTTOM = 12
/** Tick labels and title of the time axis, and the title of the strip. */
const BETWEEN = 78
const TOP = 16

/** The plot takes what the strip leaves. */
export function plotFrame(size: Size, { withStrip }: { withStrip: boolean }): PlotFrame {
  if (!withStrip) return { size, plot: { ...SIDE, top: TOP, bottom: 52 }, strip: null }
  const bottom = STRIP_BOTTOM + STRIP_HEIGHT + BETWEEN
  const strip = { ...SIDE, top: size.height - STRIP_BOTTOM - STRIP_HEIGHT, bottom: STRIP_BOTTOM }
  return { size, plot: { ...SIDE, top: TOP, bottom }, strip }
}

export const plotWidth = ({ size, plot }: PlotFrame) => size.width - plot.left - plot.right
export const plotHeight = ({ size, plot }: PlotFrame) => size.height - plot.top - plot.bottom

/** Pixels from the left of the chart. */
export const xPixel = (frame: PlotFrame, axis: Axis, value: number) =>
  frame.plot.left + shareOf(axis, value) * plotWidth(frame)

/** Pixels from the top of the chart. */
export const yPixel = (frame: PlotFrame, axis: Axis, value: number) =>
  frame.plot.top + (1 - shareOf(axis, value)) * plotHeight(frame)

export const xValue = (frame: PlotFrame, axis: Axis, pixel: number) =>
  valueAt(axis, (pixel - frame.plot.left) / plotWidth(frame))

export const yValue = (frame: PlotFrame, axis: Axis, pixel: number) =>
  valueAt(axis, 1 - (pixel - frame.plot.top) / plotHeight(frame))
