import { CHART_FONT, CHART_FONT_SIZE, type ChartTheme } from './chart-theme.ts'
import type { SketchLabel } from './sketch-labels.ts'
import type { SketchWell, TestSketch } from './test-sketch.ts'

const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' }
/** Characters that XML does not allow at all. */
// eslint-disable-next-line no-control-regex
const forbidden = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g

/** Text of anybody, made harmless inside an SVG. */
export const safeText = (text: string) =>
  text.replace(forbidden, '').replace(/[&<>"']/g, (letter) => entities[letter] ?? '')

/** The sketch of a test as a picture of its own, for documents. */
export function sketchSvg({ size, centre, wells, rings, edges }: TestSketch, theme: ChartTheme): string {
  const { width, height } = size
  const labels = [...edges, ...rings, ...wells].map(({ label }) => text(label, theme))
  const drawn = [
    ...edges.map(
      ({ kind, path, hatch }) =>
        `<path d="${path}" fill="none" stroke="${kind === 'recharge' ? theme.deepWater : theme.ink}" stroke-width="2"/>` +
        (hatch ? `<path d="${hatch}" fill="none" stroke="${theme.ink}" stroke-width="1"/>` : ''),
    ),
    ...rings.map(
      ({ radius }) =>
        `<circle cx="${centre.x}" cy="${centre.y}" r="${radius}" fill="none" stroke="${theme.inkSoft}" stroke-dasharray="4 4"/>`,
    ),
    ...wells.map((well) => wellMark(well, theme)),
    north(width, theme),
  ]
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">${drawn.join('')}${labels.join('')}</svg>`
}

const text = ({ x, y, anchor, text: said }: SketchLabel, { ink }: ChartTheme) =>
  `<text x="${x}" y="${y}" text-anchor="${anchor}" fill="${ink}" font-family="${safeText(CHART_FONT)}" font-size="${CHART_FONT_SIZE}">${safeText(said)}</text>`

const wellMark = ({ role, x, y }: SketchWell, { ochre, ink, sheet }: ChartTheme) =>
  role === 'pumped'
    ? `<circle cx="${x}" cy="${y}" r="7" fill="${ochre}"/><circle cx="${x}" cy="${y}" r="2" fill="${sheet}"/>`
    : `<circle cx="${x}" cy="${y}" r="5" fill="${sheet}" stroke="${ink}" stroke-width="1.5"/><path d="M${x - 8} ${y}H${x + 8}M${x} ${y - 8}V${y + 8}" stroke="${ink}" stroke-width="1"/>`

const north = (width: number, { inkSoft }: ChartTheme) =>
  `<path d="M${width - 16} 12l5 15-5-4-5 4z" fill="${inkSoft}"/><text x="${width - 16}" y="39" text-anchor="middle" fill="${inkSoft}" font-family="${safeText(CHART_FONT)}" font-size="${CHART_FONT_SIZE}">N</text>`
