import type { Well } from '#shared/contracts/wells.ts'
import { dateText } from '../../composables/dates.ts'

export const wellKinds: Record<Well['kind'], string> = {
  well: 'Well',
  piezometer: 'Piezometer',
  planned: 'Planned site',
}

export const visibilities: Record<Well['visibility'], { name: string; meaning: string }> = {
  published: { name: 'Published', meaning: 'Everybody who may read this region sees it.' },
  internal: { name: 'Internal', meaning: 'Analysts, stewards and administrators see it.' },
  private: { name: 'Private', meaning: 'The person who entered it and stewards see it.' },
}

/** Nothing for what everybody sees, so that only the exception is said. */
export function exposureText({ visibility, embargoUntil }: Pick<Well, 'visibility' | 'embargoUntil'>): string | null {
  if (visibility !== 'published') return visibilities[visibility].name.toLowerCase()
  return embargoUntil ? `embargoed until ${dateText(embargoUntil)}` : null
}

export const testStates = {
  'no-readings': 'no readings',
  open: 'open',
  submitted: 'in review',
  returned: 'returned',
  accepted: 'accepted',
} as const
