import { describe, expect, it, vi } from 'vitest'
import { coverage } from './family.ts'
import { families } from './index.ts'

// Two hundred fits a family: slow on a machine that does other things too.
vi.setConfig({ testTimeout: 240_000 })

const SEEDS = 200

describe('95 % intervals over seeds 1 to 200 of white noise hold the truth in 90 to 99 %', () => {
  it.each(families(false).map((family) => [family.id, family] as const))('%s', (_, family) => {
    for (const share of Object.values(coverage(family, SEEDS))) {
      expect(share).toBeGreaterThanOrEqual(0.9)
      expect(share).toBeLessThanOrEqual(0.99)
    }
  })
})
