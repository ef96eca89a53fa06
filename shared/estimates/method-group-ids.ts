/** Ways of finding a value that are compared with each other. Apart from their rule, which loads every method. */
export const METHOD_GROUPS = [
  'curve',
  'line',
  'recovery',
  'steady',
  'slug',
  'specific-capacity',
  'step',
  'reported',
] as const
export type MethodGroup = (typeof METHOD_GROUPS)[number]
