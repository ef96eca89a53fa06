import { shapeFactors } from '#shared/hydraulics/slug/shape-factors.ts'

const shapes = Object.fromEntries(Object.entries(shapeFactors).map(([id, { label }]) => [id, label]))

/** How the choices of an analysis' settings read. */
const sentences: Record<string, string> = {
  ...shapes,
  drawdown: 'Drawdown',
  'log-drawdown': 'Logarithm of drawdown',
  equal: 'Count like all others',
  huber: 'Count less (Huber)',
  pumping: 'During pumping',
  all: 'Pumping and recovery',
  superposition: 'Every step, superposed',
  equivalent: 'Pumped volume over the last rate',
}

/** @throws RangeError for a choice without words */
export function optionValueText(value: string): string {
  const text = sentences[value]
  if (!text) throw new RangeError(`No words for the choice ${value}`)
  return text
}
