import { evidence, fittedMethod } from '#shared/contracts/analyses.ts'
import { kindMethodIds } from '#shared/contracts/kind-analyses.ts'
import { methodLabel } from '#shared/words/methods.ts'
import { storageClasses } from '#shared/words/values.ts'

export interface Item {
  value: string
  title: string
}

export const quantityItems: Item[] = [
  { value: 'T', title: 'Transmissivity' },
  { value: 'S', title: 'Storage' },
  { value: 'K', title: 'Hydraulic conductivity' },
]
export const classItems: Item[] = Object.entries(storageClasses).map(([value, { name }]) => ({ value, title: name }))
export const evidenceItems: Item[] = evidence.options.map((value) => ({ value, title: value }))
export const methodItems: Item[] = [
  ...fittedMethod.options,
  ...kindMethodIds.slug.options,
  ...kindMethodIds['specific-capacity'].options,
  'reported',
].map((value) => ({
  value,
  title: methodLabel(value),
}))

/** A year as typed; null for anything that is none. */
export const yearOf = (text: string): number | null => (/^\s*(1[89]|2[01])\d\d\s*$/.test(text) ? Number(text) : null)
