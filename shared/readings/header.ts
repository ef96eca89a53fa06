import { recogniseUnit } from '#shared/quantities/recognise.ts'
import type { Dimension } from '#shared/quantities/units.ts'
import { isClean, kindOf } from './cells.ts'

/** A datum behind a length: "m bgl", "ft btoc", "masl", "m AHD". */
const WITH_DATUM = /^(m|ft|cm|mm)[\s_-]*(?:b(?:g[ls]?|toc|mp|m)|a(?:msl|sl|hd|od|gl)|msl|rl|nn|nap)$/i
const BRACKETS = /[([{]([^)\]}]+)[)\]}]/g

function unitOfText(text: string, dimension: Dimension): string | null {
  const found = recogniseUnit(text, dimension)
  if ('unit' in found) return found.unit.id
  const datum = dimension === 'length' ? WITH_DATUM.exec(text.replaceAll('.', '').trim()) : null
  return datum?.[1] ? unitOfText(datum[1], dimension) : null
}

/** The unit that a column's name gives: in brackets, or as its last word; a longer word ("minutes") anywhere. */
export function unitInName(name: string, dimension: 'length' | 'time' | 'pressure'): string | null {
  const bracketed = [...name.matchAll(BRACKETS)].map((match) => match[1] ?? '')
  const words = name.replace(BRACKETS, ' ').split(/[\s_,/:;-]+/)
  const [last = '', ...others] = words.filter((word) => word !== '').reverse()
  const candidates = [...bracketed, last, ...others.filter((word) => word.length > 2)]
  return candidates.map((text) => unitOfText(text, dimension)).find((unit) => unit !== null) ?? null
}

const isUnit = (cell: string) => {
  const bare = cell.replace(/[()[\]{}]/g, '')
  return (['length', 'time', 'pressure'] as const).some((dimension) => unitOfText(bare, dimension) !== null)
}

export interface Header {
  /** Index of the line with the column names, null without one. */
  line: number | null
  names: string[]
}

const isNames = (cells: string[], width: number) => {
  const filled = cells.filter((cell) => cell !== '')
  const texts = filled.filter((cell) => !isClean(kindOf(cell)))
  return cells.length >= Math.min(2, width) && filled.length >= Math.min(2, width) && texts.length > filled.length / 2
}

/** Column names in the lines above the first reading; a line of units below them is joined to the names. */
export function headerOf(rows: string[][], first: number, width: number): Header {
  const above = rows.slice(0, first).map((cells, line) => ({ cells, line }))
  const named = above.filter(({ cells }) => isNames(cells, width)).reverse()
  const [last, before] = named
  if (!last) return { line: null, names: Array.from({ length: width }, () => '') }
  const unitsBelow = before && last.cells.every((cell) => cell === '' || isUnit(cell))
  if (!unitsBelow) return { line: last.line, names: last.cells }
  const names = before.cells.map((name, i) => (last.cells[i] ? `${name} (${last.cells[i]})` : name))
  return { line: before.line, names }
}
