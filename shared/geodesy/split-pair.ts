/**
 * Two coordinates out of one text, or null. A semicolon or a comma with a space parts them first; then compass letters
 * (`38.4 S 21.2 W`, `S38 25 W21 11`); then a lone comma (`-38.41,-21.20`); then the only space there is, so that
 * `38,41 21,20` is read with decimal commas.
 */
const separators = [
  /^([^;]+?)\s*;\s*([^;]+)$/,
  /^((?:[^,]|,(?!\s))+?)\s*,\s+((?:[^,]|,(?!\s))+)$/,
  /^(.*?\d.*?[NSEW])\s*,?\s*([^,NSEW]*\d.*[NSEW])$/i,
  /^([NSEW].*\d.*?)\s*,?\s*([NSEW].*\d.*)$/i,
  /^([^,]+?)\s*,\s*([^,]+)$/,
  /^(\S+)\s+(\S+)$/,
]

export function splitPair(text: string): [string, string] | null {
  const tidy = text.trim().replace(/\s+,/g, ', ').replace(/\s+/g, ' ')
  // Commas inside both halves of a spaced pair are decimal commas, not a separator.
  const decimalCommas = /^[-+−]?\d+,\d+[^\s,;]* [-+−]?\d+(?:,\d+)?[^\s,;]*$/.test(tidy)
  const tried = decimalCommas ? separators.slice(-1) : separators
  for (const separator of tried) {
    const found = separator.exec(tidy)
    if (found?.[1] && found[2]) return [found[1], found[2]]
  }
  return null
}
