import { describe, expect, it } from 'vitest'
import { forestSvg } from '#shared/charts/forest-svg.ts'
import { paperTheme } from '#shared/charts/paper-theme.ts'

const row = (overrides = {}) => ({ label: 'Line', value: 100, low: 80, high: 125, determined: true, ...overrides })

describe('The picture of estimates in a report', () => {
  it('puts equal values under each other, and a larger one to the right', () => {
    const svg = forestSvg([row(), row(), row({ value: 110 })], paperTheme)!
    const [a, b, c] = [...svg.matchAll(/<circle cx="([\d.]+)"/g)].map(([, x]) => Number(x))
    expect(a).toBe(b)
    expect(c).toBeGreaterThan(a!)
  })

  it('dashes what the readings leave open, and points beyond the axis where an interval goes on', () => {
    const open = forestSvg([row(), row({ determined: false, low: 1e-9, high: 1e9 })], paperTheme)!
    expect(open.match(/stroke-dasharray/g)).toHaveLength(1)
    expect(open.match(/<path [^>]*fill=/g)).toHaveLength(2)
    expect(forestSvg([row()], paperTheme)).not.toMatch(/stroke-dasharray|<path [^>]*fill=/)
  })

  it('holds names as text, and is none without a value', () => {
    expect(forestSvg([row({ label: '<script>' })], paperTheme)).toContain('&lt;script&gt;')
    expect(forestSvg([row({ value: 0 })], paperTheme)).toBeNull()
  })
})
