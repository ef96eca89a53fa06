/** Colours of a chart, as hex. The page gives those of its present theme, a PDF those of paper. */
export interface ChartTheme {
  sheet: string
  line: string
  ink: string
  inkSoft: string
  deepWater: string
  ochre: string
}

const channels = (hex: string) => [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16))

/** A colour at some strength over whatever lies under it. */
export const faded = (hex: string, strength: number) => `rgba(${channels(hex).join(', ')}, ${strength})`

export const CHART_FONT = "Roboto, system-ui, 'Helvetica Neue', sans-serif"
export const CHART_FONT_SIZE = 12
