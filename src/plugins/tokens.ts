/** The colours of the field chart, by theme. Contrast was checked against paper and sheet (WCAG 2.2 AA). */
export const tokens = {
  light: {
    paper: '#FBFAF7',
    sheet: '#FFFFFF',
    line: '#D9D5CB',
    ink: '#1C2B33',
    inkSoft: '#5B6770',
    deepWater: '#0B4F6C',
    ochre: '#9A6412',
    moss: '#2E7D5B',
    amber: '#8F5A00',
    brick: '#B3261E',
  },
  dark: {
    paper: '#10181D',
    sheet: '#17232A',
    line: '#2B3A43',
    ink: '#E6ECEF',
    inkSoft: '#9FB0BA',
    deepWater: '#6CB8D6',
    ochre: '#E0B05C',
    moss: '#6FC29B',
    amber: '#F0B24A',
    brick: '#F2988F',
  },
} as const

export type ThemeName = keyof typeof tokens
