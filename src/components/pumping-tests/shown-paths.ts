import type { FieldProblem } from '#shared/contracts/problem.ts'

/** The test form shows every error under its own field; only paths that it has no field for are listed on top. */
const shown =
  /^(wellId|startLocal|zone|visibility|intervalBasis|intervalTopM|intervalBottomM|aquifer|thicknessM|thicknessBasis|thicknessError|rateError|staticLevelM|conditions|rateSteps|units)$|^checklist\.\w+$|^units\.\d+\.(unitId|share|basis)$|^rateSteps\.\d+\.(startS|rate|rate\.value|rate\.unit)$|^details\.(casingRadiusM|wellRadiusM|screenRadiusM|screenLengthM|screenTopM|radiusError|anisotropy|drawdownM|drawdownSdM|filterPack\.(radiusM|porosity)|storage\.(value|logSd)|repeats\.\d+\.(label|initialM|startS))$|^observationWells\.\d+\.(wellId|distanceBasis|distanceM|reason|staticLevelM)$/

export const shownPaths = (fields: readonly FieldProblem[]): string[] =>
  fields.map(({ path }) => path).filter((path) => shown.test(path))
