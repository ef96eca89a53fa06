import type { WellForm } from './well-form.ts'

const plain = [
  'code',
  'name',
  'kind',
  'visibility',
  'epsg',
  'x',
  'y',
  'positionAccuracyM',
  'depthM',
  'staticDepthM',
  'wellRadiusM',
  'casingRadiusM',
  'groundElevationM',
  'measuringPointM',
  'verticalDatum',
  'drilledYear',
  'ownerLabel',
  'notes',
  'picks',
] as const

/** Paths whose errors stand under their fields. */
export const shownPaths = ({ screens, picks }: WellForm): string[] => [
  ...plain,
  ...screens.flatMap((_, i) => ['topM', 'bottomM', 'validFrom', 'validTo'].map((key) => `screens.${i}.${key}`)),
  ...picks.flatMap((_, i) => ['unitId', 'topM', 'bottomM', 'source'].map((key) => `picks.${i}.${key}`)),
]
