import {
  DomUtil,
  Layer,
  type LatLng,
  type LeafletEventHandlerFn,
  type LeafletEventHandlerFnMap,
  type Map as LeafletMap,
  type Point,
  type ZoomAnimEvent,
} from 'leaflet'
import { nearestCopy, type MapFrame, type Painter } from './map-frame.ts'

/** How far the canvas reaches beyond the window at each side, so that a drag shows no empty edge. */
const MARGIN = 0.3

/** Where a place will lie once the running zoom has ended; Leaflet's own layers follow the animation with it. */
interface Animated {
  _latLngToNewLayerPoint(place: LatLng, zoom: number, center: LatLng): Point
}

/**
 * One canvas in the map, drawn by a painter: a layer of thousands of symbols costs one element. It moves with the map,
 * is drawn anew when the map has moved, and scales along while the map zooms.
 */
export class CanvasLayer extends Layer {
  private readonly paneName: string
  private readonly zIndex: number
  private readonly paint: Painter
  private canvas: HTMLCanvasElement | null = null
  private corner: LatLng | null = null
  private drawnZoom = 0
  private wanted = 0

  constructor(paneName: string, zIndex: number, paint: Painter) {
    super()
    this.paneName = paneName
    this.zIndex = zIndex
    this.paint = paint
  }

  override onAdd(map: LeafletMap): this {
    const pane = map.getPane(this.paneName) ?? map.createPane(this.paneName)
    pane.style.zIndex = String(this.zIndex)
    pane.style.pointerEvents = 'none'
    this.canvas = DomUtil.create('canvas', 'leaflet-zoom-animated', pane)
    this.canvas.setAttribute('aria-hidden', 'true')
    this.draw()
    return this
  }

  override onRemove(): this {
    cancelAnimationFrame(this.wanted)
    this.canvas?.remove()
    this.canvas = null
    return this
  }

  override getEvents(): Record<string, LeafletEventHandlerFn> {
    const events: LeafletEventHandlerFnMap = {
      moveend: () => this.draw(),
      resize: () => this.redraw(),
      move: () => this.followDrag(),
      zoomanim: (event) => this.followZoom(event),
    }
    return events as Record<string, LeafletEventHandlerFn>
  }

  /** Draws in the next frame; several wishes are one drawing. */
  redraw() {
    cancelAnimationFrame(this.wanted)
    this.wanted = requestAnimationFrame(() => this.draw())
  }

  private draw() {
    const { canvas, _map: map } = this
    if (!canvas || !map) return
    const size = map.getSize()
    const margin = size.multiplyBy(MARGIN).round()
    const corner = map.containerPointToLayerPoint(margin.multiplyBy(-1))
    DomUtil.setPosition(canvas, corner)
    this.corner = map.layerPointToLatLng(corner)
    this.drawnZoom = map.getZoom()
    const context = this.sized(canvas, size.add(margin.multiplyBy(2)))
    if (context) this.paint(context, this.frame(map, corner, size, margin))
  }

  private sized(canvas: HTMLCanvasElement, { x: width, y: height }: Point) {
    const ratio = window.devicePixelRatio || 1
    const context = canvas.getContext('2d')
    canvas.width = Math.round(width * ratio)
    canvas.height = Math.round(height * ratio)
    canvas.style.width = `${width}px`
    canvas.style.height = `${height}px`
    context?.setTransform(ratio, 0, 0, ratio, 0, 0)
    return context
  }

  private frame(map: LeafletMap, corner: Point, size: Point, margin: Point): MapFrame {
    const middle = map.getCenter().lng
    return {
      width: size.x + 2 * margin.x,
      height: size.y + 2 * margin.y,
      zoom: map.getZoom(),
      inner: { left: margin.x, top: margin.y, right: margin.x + size.x, bottom: margin.y + size.y },
      project(lon, lat) {
        const { x, y } = map.latLngToLayerPoint([lat, nearestCopy(lon, middle)])
        return [x - corner.x, y - corner.y]
      },
    }
  }

  /** Draws during a drag only when the margin is used up, or when fingers change the zoom. */
  private followDrag() {
    const { canvas, _map: map } = this
    if (!canvas || !map) return
    const size = map.getSize()
    const moved = map.layerPointToContainerPoint(DomUtil.getPosition(canvas)).add(size.multiplyBy(MARGIN))
    const usedUp = Math.abs(moved.x) > size.x * MARGIN || Math.abs(moved.y) > size.y * MARGIN
    if (usedUp || map.getZoom() !== this.drawnZoom) this.redraw()
  }

  private followZoom({ center, zoom }: ZoomAnimEvent) {
    const { canvas, corner, _map: map } = this
    if (!canvas || !corner || !map) return
    const scale = map.getZoomScale(zoom, this.drawnZoom)
    const target = (map as unknown as Animated)._latLngToNewLayerPoint(corner, zoom, center)
    DomUtil.setTransform(canvas, target, scale)
  }
}
