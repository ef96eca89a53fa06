/** Spellings of the words that units are built from. Compound units take every combination (see `ratio`). */
export const metre = ['m', 'metre', 'metres', 'meter', 'meters', 'mtr']
export const centimetre = ['cm', 'centimetre', 'centimetres', 'centimeter', 'centimeters']
export const millimetre = ['mm', 'millimetre', 'millimetres', 'millimeter', 'millimeters']
export const feet = ['ft', 'foot', 'feet', "'", '′']
export const inches = ['in', 'inch', 'inches', '"', '″']

export const seconds = ['s', 'sec', 'secs', 'second', 'seconds']
export const minutes = ['min', 'mins', 'mn', 'minute', 'minutes']
export const hours = ['h', 'hr', 'hrs', 'hour', 'hours']
export const days = ['d', 'day', 'days', 'dy']

export const squareMetres = ['m2', 'sqm', 'square metres', 'square meters', 'square metre', 'square meter']
export const squareCentimetres = ['cm2', 'sqcm']
export const squareFeet = ['ft2', 'sqft', 'sf', 'square feet', 'square foot']
export const cubicMetres = ['m3', 'cum', 'cbm', 'cubic metres', 'cubic meters', 'cubic metre', 'cubic meter']
export const cubicFeet = ['ft3', 'cuft', 'cf', 'cubic feet', 'cubic foot']
export const litres = ['l', 'lt', 'ltr', 'litre', 'litres', 'liter', 'liters']
export const megalitres = ['ML', 'Ml', 'megalitre', 'megalitres', 'megaliter', 'megaliters']
export const acreFeet = ['acre-ft', 'acft', 'ac-ft', 'acre-feet', 'acre-foot', 'af']

const gallon = ['gal', 'gals', 'gallon', 'gallons']
const nations = { us: ['us', 'usa', 'u.s.'], imperial: ['imp', 'imperial', 'uk', 'i'] }

/** A word with the nation before or behind it ("US gpm", "gpm (US)"), and bare, because people write it bare. */
const national = (words: string[], nation: keyof typeof nations) => [
  ...words,
  ...words.flatMap((word) => nations[nation].flatMap((mark) => [`${mark} ${word}`, `${word} ${mark}`])),
]

export type Gallon = keyof typeof nations
export const gallons = (nation: Gallon) => national(gallon, nation)
export const gallonsPerMinute = (nation: Gallon) => [
  ...national(['gpm'], nation),
  ...ratio(gallons(nation), minutes),
  ...national(ratio(gallon, minutes), nation),
]
export const gallonsPerDay = (nation: Gallon) => [
  ...national(['gpd'], nation),
  ...ratio(gallons(nation), days),
  ...national(ratio(gallon, days), nation),
]
export const millionGallonsPerDay = (nation: Gallon) => [
  ...national(['mgd', 'mgal/d', 'million gallons/d', 'million gallons/day'], nation),
]

/** Every spelling of `over` divided by every spelling of `under`. */
export function ratio(over: string[], under: string[]): string[] {
  return over.flatMap((top) => under.map((bottom) => `${top}/${bottom}`))
}
