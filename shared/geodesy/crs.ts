import { CrsError } from './crs-error.ts'
import { crsTable, type Crs, type Refusal } from './crs-table.ts'

export type { AxisOrder, Crs, DatumOperation, Refusal, RefusalReason } from './crs-table.ts'

/** The offered system of an EPSG code, or null. */
export const crsByCode = (epsg: number): Crs | null => crsTable().systems.get(epsg) ?? null

/** A system that is known but not offered, with the reason; null for all others. */
export const crsRefusal = (epsg: number): Refusal | null => crsTable().refusals.get(epsg) ?? null

/** @throws CrsError `crs/refused` with the reason, `crs/unknown` for a code outside the table. */
export function requireCrs(epsg: number): Crs {
  const system = crsByCode(epsg)
  if (system) return system
  const refusal = crsRefusal(epsg)
  if (refusal) throw new CrsError('crs/refused', { epsg, name: refusal.name, reason: refusal.reason })
  throw new CrsError('crs/unknown', { epsg })
}

const plain = (text: string) => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()

/** 0 is the code itself, then codes that begin so, names that begin so, names, areas; null is no match. */
function rank(system: Crs, words: string[]): number | null {
  const code = String(system.epsg)
  const name = plain(system.name)
  const all = `${code} ${name} ${plain(system.area)}`
  if (!words.every((word) => all.includes(word))) return null
  const [first = ''] = words
  const steps = [
    code === first,
    code.startsWith(first),
    name.startsWith(first),
    words.every((word) => name.includes(word)),
  ]
  const found = steps.indexOf(true)
  return found < 0 ? steps.length : found
}

/**
 * Offered systems whose code, name or area hold every word of `text` (no regard to case or accents), best match first.
 * An empty text finds nothing.
 */
export function searchCrs(text: string, most = 20): Crs[] {
  const words = plain(text.replace(/epsg\s*:?/i, ' '))
    .split(/\s+/)
    .filter(Boolean)
  if (words.length === 0) return []
  return [...crsTable().systems.values()]
    .map((system) => ({ system, rank: rank(system, words) }))
    .filter((row): row is { system: Crs; rank: number } => row.rank !== null)
    .sort((a, b) => a.rank - b.rank || a.system.epsg - b.system.epsg)
    .slice(0, most)
    .map((row) => row.system)
}
