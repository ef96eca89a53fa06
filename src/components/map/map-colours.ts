import { tokens, type ThemeName } from '../../plugins/tokens.ts'

/** What the map is drawn in: the theme's colours, as a canvas takes them. */
export interface MapColours {
  ink: string
  inkSoft: string
  paper: string
  sheet: string
  line: string
  deepWater: string
  ochre: string
  brick: string
}

export const mapColours = (theme: ThemeName): MapColours => tokens[theme]
