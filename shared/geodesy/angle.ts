export type CompassLetter = 'N' | 'S' | 'E' | 'W'

export interface Angle {
  /** Signed degrees: south and west are negative. */
  degrees: number
  letter: CompassLetter | null
}

export type AngleProblem = 'place/minutes' | 'place/sign-and-letter'
/** Null: the text is no angle at all. */
export type AngleResult = Angle | { problem: AngleProblem } | null

const marks = /[°º˚′'’‵″"”“]|''/g
const shape = /^([NSEW])?\s*([-+]?)\s*(\d+(?:[.,]\d+)?)(?:\s+(\d+(?:[.,]\d+)?))?(?:\s+(\d+(?:[.,]\d+)?))?\s*([NSEW])?$/

const plainText = (text: string) => text.replace(marks, ' ').replaceAll('−', '-').toUpperCase().trim()
const numberOf = (text: string | undefined) => Number((text ?? '0').replace(',', '.'))

/** Only the last of degrees, minutes, seconds may have decimals, and minutes and seconds end at 60. */
function isSexagesimal(parts: string[]): boolean {
  const wholeBeforeLast = parts.slice(0, -1).every((part) => /^\d+$/.test(part))
  return wholeBeforeLast && parts.slice(1).every((part) => numberOf(part) < 60)
}

/**
 * An angle as people write it: `-38.4172`, `38,4172° S`, `S 38 25 02`, `38°25.03'S`. Degrees, then minutes, then seconds.
 */
export function parseAngle(text: string): AngleResult {
  const found = shape.exec(plainText(text))
  if (!found) return null
  const [, before, sign, whole, minutes, seconds, after] = found
  if (before && after) return null
  const parts = [whole, minutes, seconds].filter((part) => part !== undefined)
  if (!isSexagesimal(parts)) return { problem: 'place/minutes' }
  const letter = (before ?? after ?? null) as CompassLetter | null
  if (letter && sign) return { problem: 'place/sign-and-letter' }
  const size = numberOf(whole) + numberOf(minutes) / 60 + numberOf(seconds) / 3600
  const negative = sign === '-' || letter === 'S' || letter === 'W'
  return { degrees: negative ? -size : size, letter }
}
