import Papa from 'papaparse'
import type { Delimiter, Refusal } from './model.ts'
import { MAX_READINGS_PER_SERIES } from './limits.ts'

/** Lines of the text whatever its line ends; a line end after the last line does not open another one. */
export function linesOf(text: string): string[] {
  const lines = text.replace(/^\ufeff/, '').split(/\r\n|\r|\n/)
  if (lines.at(-1) === '' || lines.at(-1) === '\u001a') lines.pop()
  return lines
}

function countLines(text: string): number {
  let count = 1
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) count++
  return text.endsWith('\n') ? count - 1 : count
}

/** Why a text cannot be a log at all, null when it may be one. Looks at its size before anything is split. */
export function refuseText(text: string): Refusal | null {
  if (text.includes('\u0000')) return { ok: false, code: 'readings/not-text', params: { kind: 'binary file' } }
  if (!/\S/.test(text)) return { ok: false, code: 'readings/empty-file', params: {} }
  const lines = countLines(text)
  if (lines <= MAX_READINGS_PER_SERIES) return null
  return { ok: false, code: 'readings/too-many-rows', params: { lines, limit: MAX_READINGS_PER_SERIES } }
}

const parse = (text: string, delimiter: Delimiter) =>
  Papa.parse<string[]>(text, { delimiter, newline: '\n', quoteChar: '"' }).data

function splitOne(line: string, delimiter: Delimiter): string[] {
  if (delimiter === ' ') return line.trim().split(/\s+/)
  return line.includes('"') ? (parse(line, delimiter)[0] ?? ['']) : line.split(delimiter)
}

/**
 * The cells of each line, trimmed. A line is always one row: a stray quotation mark (an inch sign, say)
 * must not swallow the lines that follow it.
 */
export function cellsOf(lines: string[], delimiter: Delimiter): string[][] {
  const trim = (cells: string[]) => cells.map((cell) => cell.trim())
  if (delimiter !== ' ' && lines.some((line) => line.includes('"'))) {
    const rows = parse(lines.join('\n'), delimiter)
    if (rows.length === lines.length) return rows.map(trim)
  }
  return lines.map((line) => trim(splitOne(line, delimiter)))
}
