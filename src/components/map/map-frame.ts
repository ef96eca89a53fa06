/** What a painter draws on: a canvas somewhat larger than the map's window, in CSS pixels. */
export interface MapFrame {
  width: number
  height: number
  zoom: number
  /** The window itself, without the margin around it. */
  inner: { left: number; top: number; right: number; bottom: number }
  /** Where a place lies; of the copies of the world, the one nearest to the middle of the window. */
  project: (lon: number, lat: number) => readonly [x: number, y: number]
}

export type Painter = (context: CanvasRenderingContext2D, frame: MapFrame) => void

/** The copy of a longitude nearest to another one: beyond the date line the map goes on. */
export const nearestCopy = (lon: number, to: number): number => lon + 360 * Math.round((to - lon) / 360)
