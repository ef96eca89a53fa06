import type { SlugInputs, SlugOptions, SlugRepeat } from '#shared/hydraulics/slug/slug-test.ts'

export function makeRepeat(overrides: Partial<SlugRepeat> = {}): SlugRepeat {
  const elapsed_s = overrides.elapsed_s ?? Array.from({ length: 120 }, (_, i) => i + 1)
  return {
    id: 'r1',
    label: 'Repeat 1',
    initial_m: 0.5,
    elapsed_s,
    displacement_m: elapsed_s.map((time) => (overrides.initial_m ?? 0.5) * Math.exp(-time / 30)),
    included: elapsed_s.map(() => true),
    ...overrides,
  }
}

export function makeSlugInputs(overrides: Partial<SlugInputs> = {}): SlugInputs {
  return {
    version: 1,
    wellId: 'w1',
    label: 'PB-1',
    repeats: [makeRepeat()],
    casingRadius_m: 0.025,
    wellRadius_m: 0.05,
    screenRadius_m: 0.025,
    screenLength_m: 2,
    screenTop_m: 3,
    thickness_m: 10,
    thicknessError: 0,
    filterPack: null,
    radiusError: 0,
    anisotropy: 1,
    aquifer: 'unconfined',
    storage: { value: 1e-4, logSd: 0.5 },
    ...overrides,
  }
}

export const makeSlugOptions = (overrides: Partial<SlugOptions> = {}): SlugOptions => ({
  repeatIds: null,
  ...overrides,
})
