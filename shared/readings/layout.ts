import { isClean, kindOf, type CellKind } from './cells.ts'
import { cellsOf } from './lines.ts'
import type { DecimalMark, Delimiter } from './model.ts'

/** In order of preference when two read a file equally well. */
const delimiters: Delimiter[] = ['\t', ';', '|', ',', ' ']
const SAMPLE_LINES = 200

/** Up to `SAMPLE_LINES` lines with content, spread over the file, so that a long preamble does not decide. */
export function sampleOf(lines: string[]): string[] {
  const filled = lines.filter((line) => line.trim() !== '')
  const step = Math.max(1, filled.length / SAMPLE_LINES)
  return Array.from({ length: Math.min(filled.length, SAMPLE_LINES) }, (_, i) => filled[Math.floor(i * step)] ?? '')
}

const cleanCount = (cells: string[]) => cells.filter((cell) => isClean(kindOf(cell))).length

/** Share of cells that are numbers, dates or times, in lines that have `least` of them among two cells or more. */
function share(lines: string[], delimiter: Delimiter, least: number): number {
  let total = 0
  for (const cells of cellsOf(lines, delimiter)) {
    const clean = cleanCount(cells)
    const filled = cells.filter((cell) => cell !== '').length
    if (clean >= least && cells.length >= 2) total += clean / filled
  }
  return total / lines.length
}

/** The delimiter under which most cells make sense; a comma when none does. */
export function guessDelimiter(sample: string[]): Delimiter {
  for (const least of [2, 1]) {
    const scored = delimiters.map((delimiter) => ({ delimiter, score: share(sample, delimiter, least) }))
    const best = scored.reduce((a, b) => (b.score > a.score + 1e-9 ? b : a))
    if (best.score > 0) return best.delimiter
  }
  return ','
}

const votes: { pattern: RegExp; mark: DecimalMark }[] = [
  { pattern: /^[-+−]?\d*\.\d+(?:e[-+]?\d+)?$/i, mark: '.' },
  { pattern: /^[-+−]?\d*,\d+(?:e[-+]?\d+)?$/i, mark: ',' },
  { pattern: /^[-+−]?\d{1,3}(?:,\d{3})+\.\d+$/, mark: '.' },
  { pattern: /^[-+−]?\d{1,3}(?:\.\d{3})+,\d+$/, mark: ',' },
]
const MAY_BE_THOUSANDS = /^[-+−]?[1-9]\d{0,2},\d{3}$/

/** The decimal mark most numbers use. `doubtful` when every comma may as well part thousands. */
export function guessDecimalMark(cells: string[]): { mark: DecimalMark; doubtful: boolean } {
  const cast = cells.flatMap((cell) => votes.find(({ pattern }) => pattern.test(cell))?.mark ?? [])
  const commas = cast.filter((mark) => mark === ',').length
  const mark = commas > cast.length / 2 ? ',' : '.'
  const written = cells.filter((cell) => cell.includes(','))
  const doubtful = mark === ',' && written.every((cell) => MAY_BE_THOUSANDS.test(cell))
  return { mark, doubtful }
}

/** What each column holds in most of the lines that have readings. */
export function columnKinds(rows: string[][]): CellKind[] {
  const readings = rows.filter((cells) => cleanCount(cells) >= 1)
  const width = Math.max(0, ...readings.map((cells) => cells.length))
  return Array.from({ length: width }, (_, column) => {
    const counts = new Map<CellKind, number>()
    for (const cells of readings) {
      const kind = kindOf(cells[column] ?? '')
      if (kind !== 'blank') counts.set(kind, (counts.get(kind) ?? 0) + 1)
    }
    return [...counts].reduce<[CellKind, number]>((a, b) => (b[1] > a[1] ? b : a), ['blank', 0])[0]
  })
}

const firstClean = (kinds: CellKind[]) =>
  Math.max(
    0,
    kinds.findIndex((kind) => isClean(kind)),
  )

/**
 * Index of the first line that has a reading: the first whose cells agree with every column's kind,
 * or lines directly above it that agree at least in the first column, where the time stands as a rule.
 */
export function firstReading(rows: string[][], kinds: CellKind[]): number {
  const fits = (cells: string[], column: number) => kindOf(cells[column] ?? '') === kinds[column]
  const least = Math.min(2, kinds.filter(isClean).length)
  const agrees = (cells: string[]) =>
    kinds.every((kind, column) => !isClean(kind) || cells[column] === '' || fits(cells, column)) &&
    cleanCount(cells) >= least
  const leading = firstClean(kinds)
  let first = rows.findIndex(agrees)
  if (first < 0) first = rows.findIndex((cells) => fits(cells, leading) && cells.length === kinds.length)
  while (first > 0 && fits(rows[first - 1] ?? [], leading) && rows[first - 1]?.length === kinds.length) first--
  return first
}
