import type { ThemeDefinition } from 'vuetify'
import { tokens, type ThemeName } from './tokens.ts'

function themeOf(name: ThemeName): ThemeDefinition {
  const token = tokens[name]
  const onColour = name === 'light' ? '#FFFFFF' : token.paper
  return {
    dark: name === 'dark',
    colors: {
      background: token.paper,
      surface: token.sheet,
      'surface-bright': name === 'light' ? token.sheet : token.ink,
      'surface-light': name === 'light' ? '#F1EEE6' : '#1E2C34',
      'surface-variant': token.ink,
      'on-surface-variant': token.sheet,
      'on-background': token.ink,
      'on-surface': token.ink,
      primary: token.deepWater,
      'primary-darken-1': token.deepWater,
      'on-primary': onColour,
      secondary: token.ochre,
      'secondary-darken-1': token.ochre,
      'on-secondary': onColour,
      success: token.moss,
      'on-success': onColour,
      warning: token.amber,
      'on-warning': onColour,
      error: token.brick,
      'on-error': onColour,
      info: token.deepWater,
      'on-info': onColour,
      line: token.line,
      'ink-soft': token.inkSoft,
    },
    variables: {
      'border-color': token.line,
      'border-opacity': 1,
      'high-emphasis-opacity': 1,
      // Vuetify's own 0.6 leaves labels under 4.5:1.
      'medium-emphasis-opacity': 0.75,
    },
  }
}

export const themes: Record<ThemeName, ThemeDefinition> = { light: themeOf('light'), dark: themeOf('dark') }
