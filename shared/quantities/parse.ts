export type NumberError = 'number/empty' | 'number/not-a-number' | 'number/ambiguous-separator'

export type ParsedNumber = { value: number } | { error: NumberError; params: Record<string, string | number> }

/** "1,234" read both ways. */
interface Readings {
  asDecimal: string
  asThousands: string
}

const GROUP_SPACES = /(?<=\d)[\s\u00a0\u2009\u202f'’](?=\d{3}(?!\d))/g
const SUPERSCRIPT_DIGITS = '⁰¹²³⁴⁵⁶⁷⁸⁹'

/** "1.7×10⁻⁴" and "1.7x10^-4" as 1.7e-4; the typographic minus as "-". */
function plainPower(text: string): string {
  const digits = text.replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/g, (digit) => String(SUPERSCRIPT_DIGITS.indexOf(digit)))
  return digits.replace(/[−⁻]/g, '-').replace(/\s*[×x*·]\s*10\s*\^?\s*(?=[-+]?\d)/i, 'e')
}

const isGrouped = (digits: string, separator: string) =>
  new RegExp(`^[1-9]\\d{0,2}(\\${separator}\\d{3})+$`).test(digits)

/** "1.234,5" and "1,234.5": the last mark is the decimal one, the other must group by threes. */
function bothMarks(mantissa: string): string | null {
  const decimal = mantissa.lastIndexOf(',') > mantissa.lastIndexOf('.') ? ',' : '.'
  const thousands = decimal === ',' ? '.' : ','
  const [whole = '', fraction = '', ...rest] = mantissa.split(decimal)
  if (rest.length > 0 || !isGrouped(whole, thousands)) return null
  return `${whole.replaceAll(thousands, '')}.${fraction}`
}

/** A mantissa without sign as JavaScript reads it, null when it is no number, both readings when it could be two. */
function plainMantissa(mantissa: string, spaced: boolean): string | null | Readings {
  const commas = mantissa.split(',').length - 1
  const points = mantissa.split('.').length - 1
  if (commas > 0 && points > 0) return bothMarks(mantissa)
  if (commas > 1) return isGrouped(mantissa, ',') ? mantissa.replaceAll(',', '') : null
  if (points > 1) return isGrouped(mantissa, '.') ? mantissa.replaceAll('.', '') : null
  const asDecimal = mantissa.replace(',', '.')
  if (!spaced && commas === 1 && isGrouped(mantissa, ',')) return { asDecimal, asThousands: mantissa.replace(',', '') }
  return asDecimal
}

const notANumber = (text: string): ParsedNumber => ({ error: 'number/not-a-number', params: { text } })

/**
 * The number in a person's text. Accepts a decimal comma or point, spaces or apostrophes between thousands, powers of ten.
 * "1,234" is refused with both readings in `params` (asDecimal, asThousands), because a factor of 1000 must not be guessed.
 */
export function parseNumber(text: string): ParsedNumber {
  const trimmed = text.trim()
  if (trimmed === '') return { error: 'number/empty', params: {} }
  const joined = trimmed.replace(GROUP_SPACES, '')
  const parts = /^([-+]?)([\d.,]*\d[\d.,]*)(e[-+]?\d+)?$/i.exec(plainPower(joined))
  if (!parts) return notANumber(trimmed)
  const [, sign = '', mantissa = '', power = ''] = parts
  const plain = plainMantissa(mantissa, joined !== trimmed)
  if (plain === null) return notANumber(trimmed)
  const read = (digits: string) => Number(sign + digits + power)
  if (typeof plain !== 'string') {
    const params = { text: trimmed, asDecimal: read(plain.asDecimal), asThousands: read(plain.asThousands) }
    return { error: 'number/ambiguous-separator', params }
  }
  const value = read(plain)
  return Number.isFinite(value) ? { value } : notANumber(trimmed)
}
