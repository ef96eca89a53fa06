import { describe, expect, it } from 'vitest'
import { themes } from '../../../src/plugins/theme.ts'
import { tokens, type ThemeName } from '../../../src/plugins/tokens.ts'

/** Relative luminance and contrast as WCAG 2.2 defines them ("relative luminance", "contrast ratio"). */
function luminance(hex: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const share = parseInt(hex.slice(at, at + 2), 16) / 255
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4
  })
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue
}

function contrast(one: string, other: string): number {
  const [light = 0, dark = 0] = [luminance(one), luminance(other)].sort((a, b) => b - a)
  return (light + 0.05) / (dark + 0.05)
}

const names = Object.keys(tokens) as ThemeName[]
const inks = ['ink', 'inkSoft', 'deepWater', 'ochre', 'moss', 'amber', 'brick'] as const

it('Black on white has the contrast that WCAG gives it, 21', () => {
  expect(contrast('#000000', '#FFFFFF')).toBeCloseTo(21, 10)
})

describe.each(names)('in the %s theme', (name) => {
  it.each(inks)('%s can be read as text on paper and on a sheet', (ink) => {
    for (const ground of ['paper', 'sheet'] as const)
      expect(contrast(tokens[name][ink], tokens[name][ground])).toBeGreaterThanOrEqual(4.5)
  })

  it.each(['primary', 'secondary', 'success', 'warning', 'error'] as const)(
    'the words on a %s button can be read',
    (colour) => {
      const colours = themes[name].colors as Record<string, string>
      expect(contrast(colours[colour]!, colours[`on-${colour}`]!)).toBeGreaterThanOrEqual(4.5)
    },
  )

  it('input borders stand out from the sheet by 3 to 1', () => {
    expect(contrast(tokens[name].inkSoft, tokens[name].sheet)).toBeGreaterThanOrEqual(3)
  })
})
