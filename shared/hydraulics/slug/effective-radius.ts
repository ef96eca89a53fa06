import type { SlugInputs } from './slug-test.ts'

/** Whether the level stands in the screen, so that the filter pack drains and fills with the well. */
export const levelInScreen = ({ screenTop_m }: SlugInputs) => screenTop_m < 0

/** Radius beyond which the aquifer is undisturbed: that of the filter pack, else of the bore. */
export const intakeRadius = ({ filterPack, wellRadius_m }: SlugInputs) => filterPack?.radius_m ?? wellRadius_m

/** Part of the screen that lies below the static level. */
export const wettedLength = ({ screenLength_m, screenTop_m }: SlugInputs) => screenLength_m + Math.min(0, screenTop_m)

/**
 * Radius of a tube that would hold as much water per metre as the well does where its level moves: that of the casing,
 * or, where the level stands in the screen, √(r² + n(R² − r²)) with the filter pack of porosity n and radius R.
 * Source: Bouwer 1989.
 */
export function effectiveCasingRadius(inputs: SlugInputs): number {
  if (!levelInScreen(inputs)) return inputs.casingRadius_m
  const { screenRadius_m: r, filterPack } = inputs
  return filterPack ? Math.sqrt(r * r + filterPack.porosity * (filterPack.radius_m ** 2 - r * r)) : r
}
