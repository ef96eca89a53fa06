/** Characters without a glyph or a meaning in print: controls, and marks that turn the direction of what follows. */
// eslint-disable-next-line no-control-regex
const unprintable = /[\u0000-\u0008\u000b-\u001f\u007f\u200b-\u200f\u202a-\u202e\u2066-\u2069\ufeff\ufffe\uffff]/g
/** The font has no narrow space for between thousands, but the usual one that does not break. */
const narrowSpace = /\u202f/g
/** Letters that stand beside each other in a column as wide as half of a page, and no more than that anywhere. */
const LONGEST = 28
/** Letters that stand beside each other on a line across the page. */
const ACROSS = 90

export const withoutUnprintable = (text: string): string => text.replace(unprintable, '').replace(narrowSpace, '\u00a0')

/**
 * Text of anybody as a document prints it: nothing invisible, and no word too long for its column.
 * @param columns how many columns of one width the page has
 */
export function printed(text: string, columns = 1): string {
  const longest = Math.min(LONGEST, Math.floor(ACROSS / columns))
  return withoutUnprintable(text).replace(new RegExp(`\\S{${longest}}(?=\\S)`, 'gu'), '$& ')
}
