import { methods } from '#shared/hydraulics/catalogue.ts'
import { kindMethods } from '#shared/hydraulics/kinds.ts'

const labels: Record<string, string> = Object.fromEntries(
  [...Object.values(methods), ...kindMethods].map(({ id, label }) => [id, label]),
)

/** How a value was found: the method's own name, or that only the number came down to us. */
export const methodLabel = (method: string): string => labels[method] ?? 'Reported value'
