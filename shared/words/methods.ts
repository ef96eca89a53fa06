import { methods } from '#shared/hydraulics/catalogue.ts'
import { kindMethods } from '#shared/hydraulics/kinds.ts'
import type { Method } from '#shared/hydraulics/method.ts'
import type { Requirement } from '#shared/hydraulics/requirements.ts'

const labels: Record<string, string> = Object.fromEntries(
  [...Object.values(methods), ...kindMethods].map(({ id, label }) => [id, label]),
)

/** How a value was found: the method's own name, or that only the number came down to us. */
export const methodLabel = (method: string): string => labels[method] ?? 'Reported value'

const known: Record<Requirement, string> = {
  thickness: 'the thickness of the aquifer',
  'saturated-thickness': 'the saturated thickness',
  'short-screen': 'screens shorter than the aquifer',
  'well-radius': 'the radius of the pumped well',
  'casing-radius': 'the radius of its casing',
}

function wellsText({ least, most, roles }: Method['needs']['wells']): string {
  const wells = roles.includes('pumped') ? 'well' : 'observation well'
  if (most === 1) return `one ${wells}`
  return least === 1 ? `one or more ${wells}s` : `${least} or more ${wells}s`
}

/** What a method needs of a test, as a sentence without its point: "Needs one well and readings after the stop". */
export function needsText({ needs }: Pick<Method, 'needs'>): string {
  const parts = [
    wellsText(needs.wells),
    ...(needs.phase === 'recovery' ? ['readings after the stop'] : []),
    ...(needs.known ?? []).map((one) => known[one]),
  ]
  const last = parts.pop() as string
  return `Needs ${parts.length > 0 ? `${parts.join(', ')} and ${last}` : last}`
}
