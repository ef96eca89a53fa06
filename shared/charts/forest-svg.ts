import { CHART_FONT, CHART_FONT_SIZE, type ChartTheme } from './chart-theme.ts'
import { forestPlot, type ForestEstimate, type ForestMark } from './forest-plot.ts'
import { safeText } from './sketch-svg.ts'

/** A row of the picture: a name, and its estimate in the reader's unit. */
export interface ForestRow extends Omit<ForestEstimate, 'key'> {
  label: string
}

const WIDTH = 700
const ROW = 24
const FOOT = 22
/** Where the axis begins and ends. */
const [LEFT, RIGHT] = [270, WIDTH - 24]
/** Letters that fit before the axis; the table beside the picture holds whole names. */
const LETTERS = 42

const across = (share: number) => (LEFT + share * (RIGHT - LEFT)).toFixed(1)
const shortened = (label: string) => (label.length > LETTERS ? `${label.slice(0, LETTERS - 1)}…` : label)

/** Estimates under each other with their 95 % intervals, as a picture of its own for documents; null without any. */
export function forestSvg(rows: readonly ForestRow[], theme: ChartTheme): string | null {
  const plot = forestPlot(rows.map((row, i) => ({ ...row, key: String(i) })))
  if (!plot) return null
  const foot = plot.marks.length * ROW
  const grid = plot.ticks.map(({ share, text }) => {
    const x = across(share)
    return (
      `<path d="M${x} 0V${foot}" stroke="${theme.line}" stroke-width="1"/>` +
      words({ x, y: foot + 15, anchor: 'middle', text }, theme.inkSoft)
    )
  })
  const drawn = plot.marks.map((mark, i) => row(mark, rows[Number(mark.key)]?.label ?? '', i, theme))
  const height = foot + FOOT
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH}" height="${height}" viewBox="0 0 ${WIDTH} ${height}">${grid.join('')}${drawn.join('')}</svg>`
}

/** An interval that the readings leave open is dashed; an arrow tells that it goes on beyond the axis. */
function row(mark: ForestMark, label: string, i: number, theme: ChartTheme): string {
  const y = i * ROW + ROW / 2
  const [low, high] = [across(mark.low), across(mark.high)]
  const dash = mark.determined ? '' : ' stroke-dasharray="3 3"'
  return (
    words({ x: '0', y: y + 4, anchor: 'start', text: shortened(label) }, theme.ink) +
    `<path d="M${low} ${y}H${high}" stroke="${theme.ink}" stroke-width="2"${dash}/>` +
    (mark.cutLow ? `<path d="M${low} ${y}m-5 0l6-4v8z" fill="${theme.ink}"/>` : '') +
    (mark.cutHigh ? `<path d="M${high} ${y}m5 0l-6-4v8z" fill="${theme.ink}"/>` : '') +
    `<circle cx="${across(mark.value)}" cy="${y}" r="4.5" fill="${theme.deepWater}"/>`
  )
}

interface Words {
  x: string
  y: number
  anchor: 'start' | 'middle'
  text: string
}

const words = ({ x, y, anchor, text }: Words, colour: string) =>
  `<text x="${x}" y="${y}" text-anchor="${anchor}" fill="${colour}" font-family="${safeText(CHART_FONT)}" font-size="${CHART_FONT_SIZE}">${safeText(text)}</text>`
