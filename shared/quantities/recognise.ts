import { dimensions, unitsOf, type Dimension, type Unit } from './units.ts'

export type Recognised = { unit: Unit } | { ambiguous: Unit[] } | { unknown: true }

/** Spellings that mean different things in capitals: "ml/d" is a millilitre per day, which no well test uses. */
const caseMatters = new Set(['ml/d', 'ml/day', 'ml/days'])

/** One spelling for the many ways to write a unit: "m² d⁻¹", "m^2 per day" and "(m2/day)" lose what does not matter. */
function normalise(text: string): string {
  return text
    .normalize('NFKC')
    .replace(/\u2212/g, '-')
    .replace(/\*\*|\^/g, '')
    .replace(/\s+(?:per|a|\/)\s+/gi, '/')
    .replace(/\/\(([^()]+?)[·⋅*.\s]([^()]+)\)/g, '/$1/$2')
    .replace(/[·⋅*.\s]*([a-z]+)-1/gi, '/$1')
    .replace(/[·⋅*.\s()[\]{}_]/g, '')
    .replace(/^\//, '')
}

type Index = Map<string, Set<Unit>>

function add(index: Index, key: string, unit: Unit) {
  const units = index.get(key) ?? new Set()
  index.set(key, units.add(unit))
}

function indexOf(dimension: Dimension): { exact: Index; folded: Index } {
  const exact: Index = new Map()
  const folded: Index = new Map()
  for (const unit of unitsOf(dimension)) {
    for (const spelling of [unit.id, unit.label, ...unit.aliases]) {
      const key = normalise(spelling)
      if (key === '') continue
      add(exact, key, unit)
      if (!caseMatters.has(key.toLowerCase())) add(folded, key.toLowerCase(), unit)
    }
  }
  return { exact, folded }
}

const indexes = Object.fromEntries(dimensions.map((dimension) => [dimension, indexOf(dimension)])) as Record<
  Dimension,
  ReturnType<typeof indexOf>
>

/**
 * The unit that a person's text means.
 * "gpm", "gpd/ft", "mgd" without a nation fit the US and the imperial gallon: they come back `ambiguous`, never guessed.
 */
export function recogniseUnit(text: string, dimension: Dimension): Recognised {
  const key = normalise(text)
  const { exact, folded } = indexes[dimension]
  const found = [...(exact.get(key) ?? folded.get(key.toLowerCase()) ?? [])]
  const [unit] = found
  if (!unit) return { unknown: true }
  return found.length === 1 ? { unit } : { ambiguous: found }
}
