import { parseNumber } from '#shared/quantities/parse.ts'
import type { DecimalMark } from './model.ts'

export type ReadNumber =
  | { value: number; otherMark: boolean }
  | { error: 'missing' | 'unreadable' }
  | { error: 'ambiguous'; asDecimal: number; asThousands: number }

const WITH_POINT = /^[-+]?(?:\d+\.?\d*|\.\d+)(?:e[-+]?\d+)?$/i
const WITH_COMMA = /^[-+]?(?:\d+,?\d*|,\d+)(?:e[-+]?\d+)?$/i
/** What loggers and people write when there is no value. */
const MISSING = /^(?:|n\/?a\.?|nan|null|none|missing|no data|-{1,5}|\*+|\?+|#n\/a|#value!|#div\/0!)$/i
const GROUPED_BY_POINT = /^[-+−]?[1-9]\d{0,2}\.\d{3}$/

function readUnusual(text: string, mark: DecimalMark): ReadNumber {
  const parsed = parseNumber(text)
  if ('error' in parsed) {
    if (parsed.error !== 'number/ambiguous-separator') return { error: 'unreadable' }
    const { asDecimal, asThousands } = parsed.params
    return { error: 'ambiguous', asDecimal: Number(asDecimal), asThousands: Number(asThousands) }
  }
  if (mark === ',' && GROUPED_BY_POINT.test(text))
    return { error: 'ambiguous', asDecimal: parsed.value, asThousands: parsed.value * 1000 }
  const other = mark === '.' ? ',' : '.'
  return { value: parsed.value, otherMark: text.includes(other) && !text.includes(mark) }
}

/**
 * A number in a log whose decimal mark is known. The other mark is accepted where it can only be a decimal mark
 * (`otherMark`), and refused with both readings where it may part thousands.
 */
export function readNumber(text: string, mark: DecimalMark): ReadNumber {
  if (mark === '.' && WITH_POINT.test(text)) return finite(Number(text))
  if (mark === ',' && WITH_COMMA.test(text)) return finite(Number(text.replace(',', '.')))
  return MISSING.test(text) ? { error: 'missing' } : readUnusual(text, mark)
}

const finite = (value: number): ReadNumber =>
  Number.isFinite(value) ? { value, otherMark: false } : { error: 'unreadable' }

/** Decimals written, which bound what the logger can resolve. */
export function decimalsOf(text: string): number {
  const parts = /[.,](\d+)(?:e([-+]?\d+))?$/i.exec(text)
  return parts ? Math.max(0, (parts[1]?.length ?? 0) - Number(parts[2] ?? 0)) : 0
}
