import type { ChartTheme } from './chart-theme.ts'

/** Colours of charts in documents, whatever the theme of the page: paper is white. */
export const paperTheme: ChartTheme = {
  sheet: '#FFFFFF',
  line: '#D9D5CB',
  ink: '#1C2B33',
  inkSoft: '#5B6770',
  deepWater: '#0B4F6C',
  ochre: '#9A6412',
}
