export type ThemeName = 'light' | 'dark'
export type Rgb = readonly [number, number, number]

export interface Theme {
  name: ThemeName
  sea: Rgb
  shelf: Rgb
  land: Rgb
  upland: Rgb
  wood: Rgb
  /** Share of the hillshade that is let through, for light and for shade. */
  relief: { light: number; shade: number }
  coast: string
  water: string
  roadEdge: string
  road: string
  track: string
  builtUp: string
  building: string
  label: string
  labelHalo: string
  waterLabel: string
  waterLabelHalo: string
  summit: string
}

const light: Theme = {
  name: 'light',
  sea: [203, 220, 230],
  shelf: [220, 232, 238],
  land: [243, 240, 226],
  upland: [232, 227, 209],
  wood: [219, 226, 201],
  relief: { light: 0.07, shade: 0.2 },
  coast: '#9fb2bd',
  water: '#a3c3d3',
  roadEdge: '#d9d0bb',
  road: '#fdfaf0',
  track: '#cfc5ad',
  builtUp: '#e6dfd0',
  building: '#d3c9b6',
  label: '#55616a',
  labelHalo: 'rgba(247, 245, 236, 0.85)',
  waterLabel: '#6b93aa',
  waterLabelHalo: 'rgba(240, 240, 232, 0.6)',
  summit: '#8a8571',
}

const dark: Theme = {
  name: 'dark',
  sea: [12, 22, 29],
  shelf: [18, 32, 41],
  land: [33, 43, 48],
  upland: [45, 55, 59],
  wood: [31, 46, 43],
  relief: { light: 0.26, shade: 0.36 },
  coast: '#40545f',
  water: '#2f5468',
  roadEdge: '#222d33',
  road: '#46545c',
  track: '#3e4b52',
  builtUp: '#36444b',
  building: '#44535b',
  label: '#a3b1b9',
  labelHalo: 'rgba(20, 29, 34, 0.85)',
  waterLabel: '#5f8ba0',
  waterLabelHalo: 'rgba(18, 28, 34, 0.6)',
  summit: '#7d8b8f',
}

export const themes: readonly Theme[] = [light, dark]

export const css = ([r, g, b]: Rgb) => `rgb(${r}, ${g}, ${b})`
